import { renderToStaticMarkup } from "react-dom/server";
import { expect, it, vi } from "vitest";
import { CustomerInstruments } from "@/components/visits/customer-instruments";
import { OwnHistory } from "./own-history";

vi.mock("next/link", () => ({
  default: ({ href, ...rest }: { href: string }) => <a href={href} {...rest} />,
}));

const entry = {
  id: "1",
  day: "2025-11-26",
  work: "Tuning",
  visitId: "9",
  asFoundCents: -6.4,
  asLeftCents: 0.1,
  humidityPercent: 37,
};

it("leads from each of a customer's instruments to its own page", () => {
  const piano = { id: "7", name: "Castellan 186", room: "", siteName: "Home", year: 1987 };
  const html = renderToStaticMarkup(<CustomerInstruments instruments={[piano]} shopName="Larch & Wren" />);
  expect(html).toContain('href="/my/instruments/7"');
});

it("tells the history in plain words, and leads nowhere in the staff's book", () => {
  const html = renderToStaticMarkup(
    <OwnHistory history={[entry, { ...entry, id: "2" }]} locale="en-GB" shopName="Larch & Wren" />,
  );
  expect(html).toContain("It stood 6 cents below pitch when we came, and at pitch when we left.");
  expect(html).toContain("The air in the room was at 37 % humidity.");
  expect(html).not.toContain("href=");
});

it("says when something will be there, where nothing is yet", () => {
  const html = renderToStaticMarkup(<OwnHistory history={[]} locale="en-GB" shopName="Harbour Street" />);
  expect(html).toContain("What Harbour Street does and finds appears here after the first visit.");
});
