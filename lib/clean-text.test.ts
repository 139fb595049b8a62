import { describe, expect, it } from "vitest";
import { plainName } from "@/lib/auth/plain-name";
import { cleanText } from "@/lib/clean-text";
import { customerFields } from "@/lib/customers/schema";
import { instrumentFields } from "@/lib/instruments/schema";
import { optionalText, plainText } from "@/lib/optional-text";
import { nameInput } from "@/lib/people/schema";
import { styleFields } from "@/lib/plans/schema";
import { shopName } from "@/lib/shop/schema";
import { siteFields } from "@/lib/sites/schema";

const turned = "Ida \u202Egro.elpmaxe\u202C Farrow\u2066!\u2069";

describe("a name", () => {
  it.each([
    ["a person's", (text: string) => nameInput.parse({ name: text }).name],
    ["a person's over HTTP", plainName],
    ["a shop's", (text: string) => shopName.parse(text)],
    ["a customer's", (text: string) => customerFields.shape.name.parse(text)],
    ["a site's", (text: string) => siteFields.shape.name.parse(text)],
    ["a maker's", (text: string) => instrumentFields.shape.maker.parse(text)],
    ["a style's", (text: string) => styleFields.shape.name.parse(text)],
    ["an optional text", (text: string) => optionalText(200).parse(text)],
    ["a plain text", (text: string) => plainText(200).parse(text)],
  ])("cannot turn the direction of what is read: %s", (_whose, kept) => {
    expect(kept(turned)).toBe("Ida gro.elpmaxe Farrow!");
    expect(kept("Zoë\uD83C Farrow\uDFB9")).toBe("Zoë Farrow");
    expect(kept("Zoe\u0308 Farrow")).toBe("Zoë Farrow");
  });

  it("of which nothing is left is none", () => {
    expect(shopName.safeParse("\u202E \uD800").success).toBe(false);
    expect(plainName("\u202E \uD800")).toBe("");
  });
});

it("keeps whole characters, and the marks that a script itself needs", () => {
  const text = "🎹 Иван Ñandú שלום علی‌رضا";
  expect(cleanText(text)).toBe(text.normalize("NFC"));
});
