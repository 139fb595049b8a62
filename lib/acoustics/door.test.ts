import { describe, expect, it } from "vitest";
import { answer, describeVerb, verbs } from "./door";

const sheet = {
  midi: 45,
  readings: [1, 2, 3, 4, 5, 6].map((n) => ({
    partial: n,
    hz: 110 * n * Math.sqrt((1 + 1e-4 * n * n) / 1.0001),
  })),
};

function run(verb: string, document: unknown): unknown {
  return answer(verb, JSON.stringify(document)).document;
}

describe("fit", () => {
  it("has exactly the properties that are promised", () => {
    expect(Object.keys(run("fit", sheet) as object).sort()).toEqual(
      [
        "f1Hz",
        "f1SigmaCents",
        "b",
        "bSigma",
        "bLow",
        "bHigh",
        "correlation",
        "rmsCents",
        "chi2",
        "dof",
        "nMax",
        "used",
        "rejected",
        "residuals",
        "quality",
        "warnings",
      ].sort(),
    );
  });

  it.each([
    ["not-a-number", "readings[0].hz", { readings: [{ partial: 1, hz: "110" }] }],
    ["not-a-number", "readings[0].hz", '{"readings": [{"partial": 1, "hz": 1e999}]}'],
    ["not-a-number", "readings[0].partial", { readings: [{ hz: 110 }] }],
    [
      "not-a-number",
      "readings[1].sigmaCents",
      {
        readings: [
          { partial: 1, hz: 1 },
          { partial: 2, hz: 2, sigmaCents: null },
        ],
      },
    ],
    ["wrong-type", "readings", { readings: { partial: 1 } }],
    ["wrong-type", "readings", {}],
    ["wrong-type", "", 7],
    ["wrong-type", "", "null"],
    ["bad-note", "midi", { ...sheet, midi: 45.2 }],
    ["no-readings", "readings", { readings: [] }],
    ["not-json", "", ""],
    ["not-json", "", "{"],
  ])("refuses with %s at %s", (code, path, document) => {
    const text = typeof document === "string" ? document : JSON.stringify(document);
    expect(answer("fit", text)).toMatchObject({ ok: false, document: { error: { code, path } } });
  });

  it("takes the 10 001st reading for a mistake, and answers", () => {
    const readings = Array.from({ length: 10_001 }, () => ({ partial: 1, hz: 110 }));
    expect(run("fit", { readings })).toMatchObject({
      error: { code: "too-many-readings", path: "readings" },
    });
  });
});

describe("the other verbs", () => {
  const observations = [
    { midi: 33, b: 9e-5, bSigma: 3e-6 },
    { midi: 57, b: 2.2e-4, bSigma: 3e-6 },
    { midi: 81, b: 1.8e-3, bSigma: 3e-5 },
  ];

  it("keyboard: every key with its interval and the covariance", () => {
    const document = run("keyboard", { observations }) as { keys: object[]; covariance: number[][] };
    expect(document.keys).toHaveLength(88);
    expect(document.covariance).toHaveLength(88);
    expect(Object.keys(document.keys[0] ?? {})).toEqual(
      expect.arrayContaining(["midi", "b", "bLow", "bHigh", "lnBSigma", "source", "flag", "z"]),
    );
  });

  it("stretch: a plan note per key, and evenness", () => {
    const document = run("stretch", { observations, style: "even", temperament: "vallotti" }) as {
      notes: object[];
      evenness: object;
    };
    expect(document.notes).toHaveLength(88);
    expect(Object.keys(document.notes[0] ?? {})).toEqual(
      expect.arrayContaining(["midi", "stretchCents", "bandCents", "targetHz", "listenPartial", "listenHz"]),
    );
    expect(document.evenness).toHaveProperty("intervals");
  });

  it("stretch: unknown names and shapes are refused at their place", () => {
    expect(run("stretch", { observations, style: "loud" })).toMatchObject({
      error: { code: "unknown-style" },
    });
    expect(run("stretch", { observations, temperament: "well" })).toMatchObject({
      error: { code: "unknown-temperament", path: "temperament" },
    });
    const style = {
      intervals: [{ lowerPartial: 2, upperPartial: 1, semitones: 12, weights: ["x"] }],
      smoothness: 1,
    };
    expect(run("stretch", { observations, style })).toMatchObject({
      error: { code: "not-a-number", path: "style.intervals[0].weights[0]" },
    });
  });

  it("advise: what to measure next", () => {
    const document = run("advise", { observations }) as { next: object[] };
    expect(document).toHaveProperty("enough");
    expect(document.next[0]).toHaveProperty("meanBandCents");
  });

  it("beats and temperament without stiffness", () => {
    const { beats } = run("beats", { firstMidi: 53, lastMidi: 57 }) as {
      beats: { beatsPerSecond: number }[];
    };
    expect(beats.map(({ beatsPerSecond }) => beatsPerSecond.toFixed(1))).toContain("6.9");
    const { offsets } = run("temperament", { temperament: "meantone-quarter" }) as { offsets: number[] };
    expect(offsets[0]).toBeCloseTo(10.265, 3);
  });

  it("compare: two visits", () => {
    const visit = { notes: [sheet] };
    expect(run("compare", { before: visit, after: visit })).toMatchObject({
      notes: [{ midi: 45, verdict: "unchanged", deltaLnB: 0 }],
      humidity: null,
    });
  });

  it("describe their input as a JSON schema", () => {
    for (const verb of Object.keys(verbs)) {
      expect(describeVerb(verb)).toMatchObject({ type: "object", properties: expect.any(Object) });
    }
    expect(describeVerb("fit")).toMatchObject({ required: ["readings"] });
    expect(describeVerb("constructor")).toBeNull();
  });

  it("are named when there is no such verb", () => {
    expect(answer("toString", "{}")).toMatchObject({
      ok: false,
      document: { error: { code: "unknown-verb" } },
    });
    expect(answer("fit", "[]")).toEqual({ ok: true, document: [] });
  });
});
