import { spawnSync } from "node:child_process";
import { describe, expect, it } from "vitest";

const sheet = {
  midi: 45,
  readings: [1, 2, 3, 4, 5, 6].map((n) => ({
    partial: n,
    hz: 110 * n * Math.sqrt((1 + 1e-4 * n * n) / 1.0001),
  })),
};

function spawnDoor(words: string[], input: string) {
  const { status, stdout } = spawnSync("npm", ["run", "--silent", "acoustics", "--", ...words], {
    input,
    encoding: "utf8",
  });
  return { status, document: JSON.parse(stdout) as unknown };
}

describe("the command line", () => {
  it("answers an array with an array, a bad element with its error in place, and exits 0", () => {
    const { status, document } = spawnDoor(
      ["fit"],
      JSON.stringify([sheet, { readings: [{ partial: 1, hz: 0 }] }, sheet]),
    );
    expect(status).toBe(0);
    expect(document).toMatchObject([
      { used: [1, 2, 3, 4, 5, 6], quality: "good" },
      { error: { code: "bad-frequency", path: "readings[0].hz" } },
      { used: [1, 2, 3, 4, 5, 6] },
    ]);
  });

  it("exits 2 with the error when the document is refused", () => {
    const { status, document } = spawnDoor(["fit"], '{"readings": [{"partial": 1, "hz": NaN}]}');
    expect(status).toBe(2);
    expect(document).toMatchObject({ error: { code: "not-json", path: "" } });
  });
});
