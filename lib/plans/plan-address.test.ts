import { describe, expect, it } from "vitest";
import { addressOf, planInAddress, readPitch } from "./plan-address";

const styles = ["close", "even", "wide", "published", "01a2-house"];
const asked = (search: string) => planInAddress(new URLSearchParams(search), { styles });
const habit = { style: "even", temperament: "equal", referenceHz: 440 };

describe("a plan in the address", () => {
  it("is read as it was written", () => {
    const own = Array.from({ length: 12 }, (_, index) => index / 2).join(",");
    for (const chosen of [
      { style: "01a2-house", temperament: "vallotti", referenceHz: 442.5 },
      { style: "wide", temperament: own, referenceHz: 415 },
    ]) {
      const address = addressOf("?sheet=s1", chosen, habit);
      expect(asked(address)).toEqual({ choices: chosen, faults: [] });
      expect(new URLSearchParams(address).get("sheet")).toBe("s1");
    }
  });

  it("leaves out what is the habit", () => {
    expect(addressOf("style=wide&referenceHz=442", habit, habit)).toBe("");
    expect(addressOf("", { ...habit, referenceHz: 442 }, habit)).toBe("?referenceHz=442");
  });

  it.each([
    ["style=nobody's", "a style that this shop does not have"],
    ["temperament=perfect", "a temperament that is not known"],
    ["temperament=1,2,3", "a temperament that is not known"],
    ["temperament=1,2,3,4,5,6,7,8,9,10,11,x", "a temperament that is not known"],
    ["referenceHz=4400", "not between 380 and 480 Hz"],
    ["referenceHz=1e9", "not between 380 and 480 Hz"],
    ["referenceHz=NaN", "not between 380 and 480 Hz"],
  ])("falls back on %s with a word", (search, words) => {
    const { choices, faults } = asked(`${search}&sheet=s1`);
    expect(choices).toEqual({});
    expect(faults).toEqual([expect.stringContaining(words)]);
  });

  it("takes a pitch with a decimal comma, and none outside its range", () => {
    expect(readPitch("442,5")).toBe(442.5);
    expect(readPitch(" 380 ")).toBe(380);
    for (const text of ["", "44", "379.9", "480.1", "442 Hz"]) expect(readPitch(text)).toBeNull();
  });
});
