import { renderToStaticMarkup } from "react-dom/server";
import { expect, it, vi } from "vitest";
import { FirstSteps } from "./first-steps";

vi.mock("next/link", () => ({
  default: ({ href, ...rest }: { href: string }) => <a href={href} {...rest} />,
}));

const links = (html: string) => [...html.matchAll(/href="([^"]+)"/g)].map(([, href]) => href);

it("leads from customer to site to instrument, each from the one before", () => {
  const at = (records: Parameters<typeof FirstSteps>[0]["records"]) =>
    renderToStaticMarkup(<FirstSteps records={records} mayAdd />);
  const first = at({ customerId: null, siteId: null, instruments: false });
  expect(first).toContain("Add your first customer");
  // At the head of the page and under the thumb.
  expect(links(first)).toEqual(["/customers/new", "/customers/new"]);
  expect(links(at({ customerId: "7", siteId: null, instruments: false }))[0]).toBe("/sites/new?customer=7");
  expect(links(at({ customerId: "7", siteId: "9", instruments: false }))[0]).toBe("/instruments/new?site=9");
});

it("offers a technician no step that is the office's", () => {
  const html = renderToStaticMarkup(
    <FirstSteps records={{ customerId: null, siteId: null, instruments: false }} mayAdd={false} />,
  );
  expect(links(html)).toEqual([]);
  expect(html).toContain("The office adds");
});
