// @vitest-environment happy-dom
import { QueryClientProvider } from "@tanstack/react-query";
import type { ReactNode } from "react";
import { expect, it, vi } from "vitest";
import { NewInstrumentForm } from "@/components/instruments/new-instrument-form";
import { makeQueryClient } from "@/components/providers";
import { SiteForm } from "@/components/sites/site-form";
import { NewVisitForm } from "@/components/visits/new-visit-form";
import { newId } from "@/lib/ids";
import { mounted } from "../../tests/support/mounted";

vi.mock("next/navigation", () => ({ useRouter: () => ({ push: vi.fn(), refresh: vi.fn() }) }));
vi.mock("next/link", () => ({
  default: ({ href, ...rest }: { href: string }) => <a href={href} {...rest} />,
}));

const page = mounted();

async function submit(form: ReactNode) {
  await page.show(<QueryClientProvider client={makeQueryClient()}>{form}</QueryClientProvider>);
  await page.submit();
}

const focused = () => document.activeElement?.getAttribute("name");
const never = vi.fn();

it("puts the focus where a new instrument lacks something: first the site, then what else is empty", async () => {
  const form = (site: { id: string; label: string } | null) => (
    <NewInstrumentForm
      key={site?.id}
      action={never}
      newId={newId()}
      today="2026-05-14"
      referenceHz={440}
      site={site}
      owner={null}
      back="/instruments"
    />
  );
  await submit(form(null));
  expect(focused()).toBe("siteId");
  await submit(form({ id: newId(), label: "Home" }));
  expect(focused()).toBe("maker");
  expect(never).not.toHaveBeenCalled();
});

it("does the same for a site without a customer", async () => {
  const beginning = { id: newId(), customer: null, country: "IE", timeZone: "Europe/Dublin" };
  await submit(<SiteForm action={never} beginning={beginning} countries={[]} timeZones={[]} />);
  expect(focused()).toBe("customerId");
});

it("does the same for a visit nobody comes to", async () => {
  await submit(
    <NewVisitForm
      visitId={newId()}
      site={{ id: newId(), name: "Home", timeZone: "Europe/Dublin" }}
      instruments={[]}
      technicians={[
        { id: newId(), name: "Ines" },
        { id: newId(), name: "Jonas" },
      ]}
      chosen={{ date: "2030-05-14", time: "09:00", instrumentIds: [] }}
      locale="en-GB"
      action={never}
    />,
  );
  expect(focused()).toBe("technicianIds");
});
