// @vitest-environment happy-dom
import { QueryClientProvider } from "@tanstack/react-query";
import { act, type ReactNode } from "react";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { CustomersLedger } from "@/components/customers/customers-ledger";
import { InstrumentsLedger } from "@/components/instruments/instruments-ledger";
import { makeQueryClient } from "@/components/providers";
import { SitesLedger } from "@/components/sites/sites-ledger";
import { shownMessages } from "@/components/ui/message-queue";
import type { CustomerRow } from "@/lib/customers/schema";
import { mounted } from "../../tests/support/mounted";
import { ArchiveButton } from "./archive-button";
import type { ArchiveAction } from "./use-archive";

const router = { push: vi.fn(), refresh: vi.fn() };
let search = "";
vi.mock("next/navigation", () => ({
  useRouter: () => router,
  usePathname: () => "/customers",
  useSearchParams: () => new URLSearchParams(search),
}));
vi.mock("next/link", () => ({
  default: ({ href, ...rest }: { href: string }) => <a href={href} {...rest} />,
}));

const clock = { locale: "en-GB", timeZone: "Europe/Dublin" };
const customer = (id: string, name: string): CustomerRow => ({
  id,
  name,
  kind: "person",
  contactName: null,
  email: null,
  phone: null,
  archivedAt: null,
  updatedAt: "2026-05-14T08:00:00.000Z",
  version: 1,
  sites: 1,
  instruments: 2,
});
const first = { items: [customer("1", "Lynn"), customer("2", "Tark"), customer("3", "Moravec")], next: null };

const visitId = "0196a1b2-0000-7000-8000-000000000001";
const asks: Awaited<ReturnType<ArchiveAction>> = {
  ok: false,
  error: {
    code: "needs-confirming",
    message: "A visit of this customer is not over yet.",
    current: {
      count: 7,
      visits: [
        {
          id: visitId,
          start: "2030-05-14T09:00:00+01:00",
          end: "2030-05-14T10:00:00+01:00",
          state: "confirmed",
          siteName: "Rope Walk 14",
        },
      ],
    },
  },
};
const done = (id: string): Awaited<ReturnType<ArchiveAction>> => ({
  ok: true,
  data: { id, name: `Customer ${id}`, version: 2, archivedAt: "2026-05-14T08:00:00.000Z" },
});

/** Archives everybody but Tark, who has visits to come, and Tark too once it is confirmed. */
function archiveAction() {
  return vi.fn<ArchiveAction>(async (input) => {
    const { id, confirm } = input as { id: string; confirm?: boolean };
    return id === "2" && !confirm ? asks : done(id);
  });
}

const page = mounted();
const { press } = page;
beforeEach(() => {
  vi.stubGlobal("fetch", async () => Response.json(first));
  router.push.mockReset();
  search = "";
});
afterEach(() => vi.unstubAllGlobals());

const show = (what: ReactNode) =>
  page.show(<QueryClientProvider client={makeQueryClient()}>{what}</QueryClientProvider>);
async function choose(...ids: string[]) {
  for (const id of ids) {
    const box = page.host().querySelector<HTMLInputElement>(`[data-row="${id}"] [data-row-check]`);
    await act(async () => box?.click());
  }
}
const question = () => page.host().querySelector("dialog")?.textContent ?? "";

describe("archiving from a list", () => {
  it("archives what has nothing to come and asks about the rest, naming the visits", async () => {
    const archive = archiveAction();
    await show(<CustomersLedger first={first} clock={clock} mayAdd archive={archive} />);
    await choose("1", "2");
    await press("Archive");
    expect(archive.mock.calls.map(([input]) => input)).toEqual([
      { id: "1", version: 1, archived: true },
      { id: "2", version: 1, archived: true },
    ]);
    expect(question()).toContain("Archive Tark?");
    expect(question()).toContain("7 visits are not over yet");
    expect(question()).toContain("Rope Walk 14");
    expect(question()).toContain("and 6 more");
    expect(page.host().querySelector(`dialog a[href="/visits/${visitId}"]`)).not.toBeNull();
    await press("Archive all the same");
    expect(archive).toHaveBeenLastCalledWith({ id: "2", version: 1, archived: true, confirm: true });
    expect(question()).toBe("");
  });

  it("leaves the record as it is when the answer is to keep it", async () => {
    const archive = archiveAction();
    await show(<CustomersLedger first={first} clock={clock} mayAdd archive={archive} />);
    await choose("2");
    await press("Archive");
    await press("Keep the customer");
    expect(archive).toHaveBeenCalledTimes(1);
    expect(question()).toBe("");
  });

  it("restores in the archived list, and says why where something was refused", async () => {
    search = "archived=only";
    const archive = vi.fn<ArchiveAction>(async () => ({
      ok: false,
      error: { code: "stale", message: "Somebody changed this customer meanwhile." },
    }));
    await show(<CustomersLedger first={first} clock={clock} mayAdd archive={archive} />);
    await choose("1");
    await press("Restore");
    expect(archive).toHaveBeenCalledWith({ id: "1", version: 1, archived: false });
    expect(shownMessages().at(-1)).toMatchObject({
      text: "Lynn was left as it is.",
      detail: "Somebody changed this customer meanwhile.",
    });
  });

  it("offers nothing to a person who may not", async () => {
    await show(<CustomersLedger first={first} clock={clock} mayAdd={false} />);
    expect(page.host().querySelector("[data-row-check]")).toBeNull();
  });
});

it("asks on a record's own page too, and stays there until it is confirmed", async () => {
  const archive = archiveAction();
  await show(
    <ArchiveButton
      record={customer("2", "Tark")}
      action={archive}
      listKey={["customers"]}
      listHref="/customers"
      words={["customer", "customers"]}
      locale="en-GB"
    />,
  );
  await press("Archive");
  expect(router.push).not.toHaveBeenCalled();
  await press("Archive all the same");
  expect(router.push).toHaveBeenCalledWith("/customers");
});

it("says of each list what to do first when it is empty", async () => {
  const none = { items: [], next: null };
  vi.stubGlobal("fetch", async () => Response.json(none));
  for (const [ledger, href] of [
    [<CustomersLedger key="c" first={none} clock={clock} mayAdd />, "/customers/new"],
    [<SitesLedger key="s" first={none} clock={clock} mayAdd />, "/customers"],
    [<InstrumentsLedger key="i" first={none} clock={clock} mayAdd />, "/instruments/new"],
  ] as const) {
    await show(ledger);
    expect(page.host().querySelector("a")?.getAttribute("href")).toBe(href);
  }
});
