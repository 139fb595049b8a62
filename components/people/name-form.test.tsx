import { renderToStaticMarkup } from "react-dom/server";
import { expect, it } from "vitest";
import { NameForm } from "./name-form";

it("shows what is stored before any script has run, and never sends what is typed in an address", () => {
  const html = renderToStaticMarkup(
    <NameForm name="Ida Farrow" action={async () => ({ ok: true, data: { name: "Ida Farrow" } })} />,
  );
  expect(html).toMatch(/<input[^>]*name="name"[^>]*value="Ida Farrow"/);
  expect(html).toMatch(/<form[^>]*method="post"/);
});
