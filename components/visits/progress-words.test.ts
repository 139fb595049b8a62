import { describe, expect, it } from "vitest";
import type { Standing, Step } from "@/lib/visits/progress/rules";
import type { JobProgress } from "@/lib/visits/progress/service";
import type { VisitState } from "@/lib/visits/rules";
import { goesOn, jobLine, planWords, readingsWords, standingWords, takenWords } from "./progress-words";

const standing = (facts: Partial<Standing> = {}): Standing => ({
  sheetId: "sheet",
  takenAt: "2026-05-14T08:12:00.000Z",
  notes: 17,
  referenceHz: 440,
  a4Cents: 3.8,
  pitchCents: 3.1,
  humidityPercent: 58,
  temperatureC: 21.4,
  ...facts,
});

const job = (progress: Partial<JobProgress["progress"]>): JobProgress => ({
  id: "job",
  instrumentId: "piano",
  instrument: "Castellan 186",
  room: "",
  work: "Tuning",
  progress: {
    found: null,
    raised: null,
    readings: null,
    plan: null,
    left: null,
    otherSheets: [],
    ...progress,
  },
});

describe("the words of a job", () => {
  it("say the pitch of A4 with its sign and the air with its units", () => {
    expect(standingWords(standing())).toBe("A4 +3.8 cents, 58 %, 21.4 °C");
    expect(standingWords(standing({ a4Cents: -6.4, temperatureC: null }))).toBe("A4 −6.4 cents, 58 %");
  });

  it("say what the cents are of where A4 was not read, and from which reference where it is unusual", () => {
    const air = { humidityPercent: null, temperatureC: null };
    expect(standingWords(standing({ a4Cents: null, ...air }))).toBe("+3.1 cents over 17 notes");
    expect(standingWords(standing({ referenceHz: 442, ...air }))).toBe("A4 +3.8 cents from 442 Hz");
  });

  it("say that the pitch is missing instead of a dash", () => {
    expect(standingWords(standing({ a4Cents: null, pitchCents: null, notes: 0 }))).toBe(
      "pitch not read yet, 58 %, 21.4 °C",
    );
  });

  it("count notes and name those that do not belong", () => {
    const count = { notes: 17, good: 15, usable: 1, repeat: 1 };
    expect(readingsWords(count, [])).toBe("17 notes: 15 good, 1 usable, 1 to repeat");
    expect(readingsWords({ notes: 1, good: 1, usable: 0, repeat: 0 }, [{ midi: 88 }])).toBe(
      "1 note: 1 good; E6 does not belong",
    );
    expect(readingsWords(count, [{ midi: 88 }, { midi: 45 }])).toContain("; E6 and A2 do not belong");
  });

  it("name style, temperament and reference of a plan", () => {
    const plan = { sheetId: "s", createdAt: "", styleName: "Even harbour", referenceHz: 440 };
    expect(planWords({ ...plan, temperament: "equal" })).toBe("Even harbour, Equal, A4 440 Hz");
  });

  it("tell a closed job in one line, and one not begun as such", () => {
    const readings = { sheetId: "s", takenAt: "", notes: 17, good: 17, usable: 0, repeat: 0 };
    expect(jobLine(job({ found: standing(), readings }).progress)).toBe(
      "As found A4 +3.8 cents, 58 %, 21.4 °C; 17 notes",
    );
    expect(jobLine(job({}).progress)).toBe("Nothing read yet");
  });

  it("give the time by the site's clock, and the day where it was another one", () => {
    const clock = { locale: "en-GB", timeZone: "Europe/Dublin" };
    expect(takenWords("2026-05-14T08:12:00.000Z", { day: "2026-05-14", ...clock })).toBe("9:12");
    expect(takenWords("2026-05-14T23:30:00.000Z", { day: "2026-05-14", ...clock })).toBe("15 May 2026");
  });
});

describe("where the work goes on", () => {
  const at = (
    jobs: JobProgress[],
    next: Step | null,
    more: { state?: VisitState; canRecord?: boolean } = {},
  ) =>
    goesOn(
      {
        visit: { state: more.state ?? "in-progress" },
        canRecord: more.canRecord ?? true,
        jobs,
        opened: { jobId: "job", next, strangers: [], history: [], standingNote: null },
      },
      "/visits/7",
    );

  it("leads to a new sheet of the right stage, and to the one begun where there is one", () => {
    expect(at([job({})], "found")).toEqual({
      label: "Continue: read as found",
      href: "/instruments/piano/sheets/new?job=job&stage=as-found",
    });
    expect(at([job({ found: standing({ notes: 0 }) })], "found")?.href).toBe(
      "/instruments/piano/sheets/sheet",
    );
    expect(at([job({ found: standing() })], "left")?.href).toContain("stage=as-left");
  });

  it("leads to the next instrument when this one is read as left, and nowhere after the last", () => {
    const left = job({ left: standing() });
    const other = { ...job({}), id: "other", instrument: "Castellan 118" };
    expect(at([left, other], null)).toEqual({
      label: "Continue: Castellan 118",
      href: "/visits/7?job=other",
    });
    expect(at([left, { ...other, progress: left.progress }], null)).toBeNull();
  });

  it("leads nowhere before the work has begun, and for a person who may not record", () => {
    expect(at([job({})], null, { state: "confirmed" })).toBeNull();
    expect(at([job({})], null, { canRecord: false })).toBeNull();
  });
});
