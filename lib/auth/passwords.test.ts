import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  longest,
  normalisePassword,
  passwordFault,
  shortestAlone,
  shortestWithSecondStep,
} from "./passwords";

// Lengths, code points, NFKC and the blocklist: NIST SP 800-63B-4, section 3.1.1.2.

describe("length", () => {
  it("is at least 15 alone and 8 beside a second step", () => {
    expect(passwordFault("four teen char")).toContain("15");
    expect(passwordFault("fifteen chars !")).toBeNull();
    expect(passwordFault("Kiln&9v", { secondStep: true })).toContain("8");
    expect(passwordFault("Kiln&9vq", { secondStep: true })).toBeNull();
    expect([shortestAlone, shortestWithSecondStep]).toEqual([15, 8]);
  });

  it("allows far more than 64 characters", () => {
    const words = "the tuning pin turned a quarter of a degree and the fifth came home, ".repeat(4);
    expect(passwordFault(words.slice(0, longest))).toBeNull();
    expect(passwordFault(words.padEnd(longest + 1, "z"))).toContain(String(longest));
  });

  it("counts each code point once", () => {
    // Fourteen musical signs outside the basic plane are 28 UTF-16 units.
    const clefs = [..."𝄞𝄢𝄡𝅝𝅗𝅥𝅘𝅥𝅘𝅥𝅮𝄐𝄑𝄒𝄓𝄔𝄕𝄖𝄗"].slice(0, 14);
    expect(passwordFault(clefs.join(""))).toContain("15");
  });

  it("counts after normalising, as the hash sees it", () => {
    // Fifteen code points that compose to fourteen.
    expect("abc def ghq st".concat("e\u0301").normalize("NFKC")).toHaveLength(15);
    expect(passwordFault("bcd fgh kqsv e\u0301")).toContain("15");
  });
});

describe("composition", () => {
  it("is free: any mixture that is long and irregular will do", () => {
    for (const password of [
      "all lower letters here",
      "ÄÖÜ ĄĘŁ ŠČŽ ÅÆØ",
      "9071 4426 8853 1",
      "調律師のピアノは毎年二回調整する",
    ])
      expect(passwordFault(password), password).toBeNull();
  });

  it("never asks random passwords of a keeper to be something else", () => {
    const characters = fc.constantFrom(
      ..."abcdefghijkmnpqrstuvwxyzABCDEFGHJKLMNPQRSTUVWXYZ23456789!-_".split(""),
    );
    fc.assert(
      fc.property(fc.array(characters, { minLength: 20, maxLength: 40 }), (typed) => {
        // Twenty characters with fewer than ten different ones do not come out of a generator.
        fc.pre(new Set(typed).size >= 10);
        return passwordFault(typed.join("")) === null;
      }),
      { numRuns: 300, seed: 15 },
    );
  });
});

describe("what is guessed first is refused, and the reason said", () => {
  it.each([
    ["aaaaaaaaaaaaaaaa", "repeats a few characters"],
    ["abcabcabcabcabcabc", "repeats a few characters"],
    ["larch7larch7larch7", "repeats one piece"],
    ["abcdefghijklmnop", "run of neighbouring"],
    ["9876543210987654", "run of neighbouring"],
    ["password12345678", "commonest"],
    ["welcome87654321password", "commonest"],
    ["Correct horse battery staple!", "commonest"],
    ["P a s s w o r t 2 0 2 6", "commonest"],
  ])("%s", (password, reason) => {
    expect(passwordFault(password)).toContain(reason);
  });

  it("names, addresses and the shop, but not a phrase that merely holds one", () => {
    const context = ["Wilhelmina Oakenfold", "Larch & Wren Pianos"];
    expect(passwordFault("WilhelminaOakenfold1", { context })).toContain("your name");
    expect(passwordFault("larch-wren-pianos-26", { context })).toContain("your name");
    expect(passwordFault("WilhelminaOakenfold-1234567890", { context })).toContain("your name");
    expect(
      passwordFault("Oakenfold never strings a bass before noon", { context: ["Oakenfold"] }),
    ).toBeNull();
    expect(passwordFault("an and on and up and away", { context: ["and"] })).toBeNull();
  });
});

describe("normalising", () => {
  it("makes one of what looks the same on any keyboard, and is done once for all", () => {
    expect(normalisePassword("cafe\u0301 \ufb01ve")).toBe(normalisePassword("caf\u00e9 five"));
    fc.assert(
      fc.property(fc.string({ unit: "grapheme" }), (text) => {
        const once = normalisePassword(text);
        return normalisePassword(once) === once;
      }),
      { numRuns: 200, seed: 7 },
    );
  });

  it("keeps spaces and letter case", () => {
    expect(normalisePassword(" A b ")).toBe(" A b ");
  });
});
