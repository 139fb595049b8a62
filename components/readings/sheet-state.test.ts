import { describe, expect, it } from "vitest";
import { fit } from "@/lib/acoustics";
import { readingHz } from "@/lib/readings/rules";
import type { NoteRecord } from "@/lib/readings/schema";
import { cellText } from "./cell-look";
import { type Around, liveOf } from "./live-fit";
import { type Cell, inputOf, isChanged, isWhole, type Place, rowKey } from "./sheet-row";
import type { SheetState } from "./sheet-rows";
import { keptDrafts, type SheetAction, sheetReducer, sheetState, shownRows } from "./sheet-state";

const G3: Place = { midi: 55, string: "all", take: 1 };
const A4: Place = { midi: 69, string: "all", take: 1 };
const g3 = rowKey(G3);
const a4 = rowKey(A4);

/** A note as the server keeps it, from cents typed at A4 = 440 Hz. */
function note(midi: number, cents: readonly number[], version = 1): NoteRecord {
  const readings = cents.map((value, index) => ({
    partial: index + 1,
    hz: readingHz({ partial: index + 1, cents: value }, midi, 440),
    sigmaCents: null,
  }));
  return {
    ...fit({ midi, readings: readings.map(({ partial, hz }) => ({ partial, hz })) }),
    id: `00000000-0000-7000-8000-0000000000${midi}`,
    midi,
    string: "all",
    take: 1,
    readings,
    kept: [],
    dropped: [],
    fitVersion: 1,
    version,
  };
}

const run = (state: SheetState, ...actions: SheetAction[]) => actions.reduce(sheetReducer, state);
const empty = sheetState(440, []);
const withG3 = sheetState(440, [note(55, [2.8, 3.9, 4.7, 4.9])]);
const type = (partial: number, text: string, place = G3): SheetAction => ({
  type: "type",
  place,
  partial,
  text,
});
const settle: SheetAction = { type: "settle" };
const row = (state: SheetState, key = g3) => {
  const found = state.rows[key];
  if (!found) throw new Error(`no row ${key}`);
  return found;
};
const text = (state: SheetState, partial: number, key = g3) =>
  cellText(row(state, key), partial, { unit: state.unit, referenceHz: 440, inHand: false });

describe("typing", () => {
  it("keeps text that is no number, and does not call the row fit to be sent", () => {
    const state = run(empty, type(1, "2.8"), settle, type(2, "3..9"), settle);
    expect(text(state, 2)).toBe("3..9");
    expect(isWhole(row(state), 440)).toBe(false);
    expect(isChanged(row(state), 440)).toBe(true);
  });

  it("waits until a cell is left before it counts", () => {
    const typing = run(empty, type(1, "2.8"));
    expect(isWhole(row(typing), 440)).toBe(false);
    expect(isWhole(row(run(typing, settle)), 440)).toBe(true);
  });

  it("settles the cell before when the next one is typed in without leaving", () => {
    const state = run(empty, type(1, "2.8"), type(2, "3.9"));
    expect((row(state).cells[1] as Extract<Cell, { kind: "typed" }>).settled).toBe(true);
    expect((row(state).cells[2] as Extract<Cell, { kind: "typed" }>).settled).toBe(false);
  });

  it("goes back to the number before on revert, and to nothing where nothing was", () => {
    expect(text(run(withG3, type(1, "999"), type(1, "99"), { type: "revert" }), 1)).toBe("+2.8");
    expect(row(run(empty, type(1, "9"), { type: "revert" })).cells).toEqual({});
  });

  it("takes an emptied cell out, with what was decided about it", () => {
    const state = run(withG3, { type: "judge", key: g3, partial: 2, keep: false }, type(2, " "), settle);
    expect(row(state).cells[2]).toBeUndefined();
    expect(row(state).dropped).toEqual([]);
    expect(isChanged(row(state), 440)).toBe(true);
  });

  it("finds nothing to send when the same number is typed again", () => {
    expect(isChanged(row(run(withG3, type(1, "+2.8"), settle)), 440)).toBe(false);
    expect(isChanged(row(run(withG3, type(1, "2,80"), settle)), 440)).toBe(false);
    expect(isChanged(row(run(withG3, type(1, "2.9"), settle)), 440)).toBe(true);
  });
});

describe("the other unit", () => {
  it("changes what is shown and nothing that is kept", () => {
    const typed = run(
      empty,
      { type: "unit", unit: "hz" },
      type(1, "440.5", A4),
      settle,
      type(2, "x", A4),
      settle,
    );
    const inCents = run(typed, { type: "unit", unit: "cents" });
    expect(row(inCents, a4).cells).toEqual(row(typed, a4).cells);
    expect(text(inCents, 1, a4)).toBe("+2.0");
    expect(text(inCents, 2, a4)).toBe("x");
    expect(text(run(inCents, { type: "unit", unit: "hz" }), 1, a4)).toBe("440.5");
  });

  it("shows a saved reading in both", () => {
    expect(text(withG3, 1)).toBe("+2.8");
    expect(text(run(withG3, { type: "unit", unit: "hz" }), 1)).toBe("196.31");
  });
});

describe("saving", () => {
  const typedRow = run(withG3, type(5, "7.2"), settle);

  it("takes the server's answer and is then unchanged", () => {
    const sent = run(typedRow, { type: "sending", keys: [g3] });
    expect(row(sent).sending).toBe(true);
    const saved = run(sent, { type: "saved", key: g3, record: note(55, [2.8, 3.9, 4.7, 4.9, 7.2], 2) });
    expect(row(saved)).toMatchObject({ sending: false, version: 2, trouble: null });
    expect(isChanged(row(saved), 440)).toBe(false);
    expect(row(saved).cells[5]).toMatchObject({ kind: "read" });
  });

  it("keeps what was typed while the answer was on its way, on the new version", () => {
    const state = run(
      typedRow,
      { type: "sending", keys: [g3] },
      type(6, "22.9"),
      { type: "saved", key: g3, record: note(55, [2.8, 3.9, 4.7, 4.9, 7.2], 2) },
      settle,
    );
    expect(text(state, 6)).toBe("22.9");
    expect(isChanged(row(state), 440)).toBe(true);
    expect(inputOf(row(state), 440)).toMatchObject({ version: 2 });
    expect(inputOf(row(state), 440).readings).toHaveLength(6);
  });

  it("sends version 0 for a note that was not there, and confirms what the server has already", () => {
    expect(inputOf(row(run(empty, type(1, "2.8"), settle)), 440).version).toBe(0);
    const state = run(withG3, type(2, "4.1"), settle);
    expect(inputOf(row(state), 440)).toMatchObject({ version: 1, confirmed: [1, 3, 4] });
  });

  it("shows the server's words at the partial, and forgets them when it is changed", () => {
    const refused = run(
      typedRow,
      { type: "sending", keys: [g3] },
      { type: "failed", key: g3, trouble: { kind: "refused", message: "" }, faults: { 5: "Far off." } },
    );
    expect(row(refused)).toMatchObject({ faults: { 5: "Far off." }, trouble: null, sending: false });
    expect(isWhole(row(refused), 440)).toBe(false);
    expect(text(refused, 5)).toBe("7.2");
    expect(isWhole(row(run(refused, type(5, "7.3"), settle)), 440)).toBe(true);
    const confirmed = run(refused, { type: "confirm", key: g3, partial: 5 });
    expect(isWhole(row(confirmed), 440)).toBe(true);
    expect(inputOf(row(confirmed), 440).confirmed).toContain(5);
  });

  it("keeps everything typed through silence and a lost sign-in", () => {
    for (const kind of ["network", "signed-out"] as const) {
      const state = run(
        typedRow,
        { type: "sending", keys: [g3] },
        { type: "failed", key: g3, trouble: { kind } },
      );
      expect(text(state, 5)).toBe("7.2");
      expect(row(state).trouble).toEqual({ kind });
      expect(row(run(state, { type: "again", key: g3 })).trouble).toBeNull();
    }
  });

  it("does not take typing on for an answer to a lost sign-in", () => {
    const state = run(
      typedRow,
      { type: "failed", key: g3, trouble: { kind: "signed-out" } },
      type(6, "1"),
      settle,
    );
    expect(row(state).trouble).toEqual({ kind: "signed-out" });
  });
});

describe("two people at one note", () => {
  const theirs = note(55, [2.8, 3.9, 4.7, 4.9, 8.8], 3);
  const conflict = run(
    withG3,
    type(5, "7.2"),
    settle,
    { type: "sending", keys: [g3] },
    { type: "failed", key: g3, trouble: { kind: "stale", theirs } },
  );

  it("lets mine stand until one is chosen", () => {
    expect(text(conflict, 5)).toBe("7.2");
    const mine = run(conflict, { type: "settle-conflict", key: g3, take: "mine" });
    expect(text(mine, 5)).toBe("7.2");
    expect(inputOf(row(mine), 440).version).toBe(3);
    expect(isChanged(row(mine), 440)).toBe(true);
  });

  it("takes theirs, and gives mine back on undo", () => {
    const taken = run(conflict, { type: "settle-conflict", key: g3, take: "theirs" });
    expect(text(taken, 5)).toBe("+8.8");
    expect(isChanged(row(taken), 440)).toBe(false);
    const back = run(taken, { type: "undo", key: g3 });
    expect(text(back, 5)).toBe("7.2");
    expect(inputOf(row(back), 440).version).toBe(3);
  });

  it("leaves a note removed by the other, or writes it anew", () => {
    const gone = run(conflict, { type: "failed", key: g3, trouble: { kind: "stale", theirs: null } });
    expect(run(gone, { type: "settle-conflict", key: g3, take: "theirs" }).rows[g3]).toBeUndefined();
    expect(row(run(gone, { type: "settle-conflict", key: g3, take: "mine" })).version).toBe(0);
  });

  it("follows the sheet as read anew, but never under the hands of somebody typing", () => {
    expect(text(run(withG3, { type: "received", notes: [theirs] }), 5)).toBe("+8.8");
    expect(run(withG3, { type: "received", notes: [] }).rows[g3]).toBeUndefined();
    const typing = run(withG3, type(5, "7.2"), settle);
    expect(text(run(typing, { type: "received", notes: [theirs] }), 5)).toBe("7.2");
    expect(text(run(typing, { type: "received", notes: [] }), 5)).toBe("7.2");
    expect(run(withG3, { type: "received", notes: [note(69, [1, 2, 3])] }).order).toEqual([a4]);
  });

  it("counts cents still unsaved from the sheet's reference as it is by now", () => {
    const typed = run(empty, type(1, "0.0", A4), settle);
    expect(inputOf(row(typed, a4), typed.referenceHz).readings[0]?.hz).toBeCloseTo(440, 9);
    const moved = run(typed, { type: "received", notes: [], referenceHz: 442 });
    expect(inputOf(row(moved, a4), moved.referenceHz).readings[0]?.hz).toBeCloseTo(442, 9);
  });

  it("does not let an older reading of the sheet undo a newer save", () => {
    const saved = run(withG3, type(5, "8.8"), settle, { type: "saved", key: g3, record: theirs });
    expect(text(run(saved, { type: "received", notes: [note(55, [2.8, 3.9], 2)] }), 5)).toBe("+8.8");
  });
});

describe("one's own write behind a reload", () => {
  const sending = run(withG3, type(5, "7.2"), settle, { type: "sending", keys: [g3] });
  const arrived = note(55, [2.8, 3.9, 4.7, 4.9, 7.2], 2);
  const reload = (before: SheetState, notes: readonly NoteRecord[]) =>
    run(sheetState(440, notes), { type: "restore", drafts: keptDrafts(before) });

  it("that has arrived carries what was typed after it", () => {
    const state = run(reload(run(sending, type(6, "9.9"), settle), [arrived]), type(7, "12.0"), settle);
    expect(inputOf(row(state), 440)).toMatchObject({ version: 2 });
    expect(inputOf(row(state), 440).readings).toHaveLength(7);
  });

  it("that arrives only after the page was read anew is no clash", () => {
    const state = run(
      reload(sending, [note(55, [2.8, 3.9, 4.7, 4.9])]),
      type(6, "9.9"),
      settle,
      { type: "sending", keys: [g3] },
      { type: "failed", key: g3, trouble: { kind: "stale", theirs: arrived } },
    );
    expect(row(state)).toMatchObject({ trouble: null, sending: false, version: 2 });
    expect(text(state, 6)).toBe("9.9");
    expect(isChanged(row(state), 440)).toBe(true);
  });

  it("is told from somebody else's, before a reload and after", () => {
    const theirs = note(55, [2.8, 3.9, 4.7, 4.9, 8.8], 2);
    const stale: SheetAction = { type: "failed", key: g3, trouble: { kind: "stale", theirs } };
    expect(row(run(sending, stale)).trouble).toMatchObject({ kind: "stale" });
    const state = reload(sending, [theirs]);
    expect(inputOf(row(state), 440).version).toBe(1);
    expect(row(run(state, { type: "sending", keys: [g3] }, stale)).trouble).toMatchObject({ kind: "stale" });
  });

  it("is told apart when it was a removal", () => {
    const removing = run(withG3, { type: "remove", key: g3 }, { type: "sending", keys: [g3] });
    const back = run(
      removing,
      { type: "failed", key: g3, trouble: { kind: "network" } },
      { type: "undo", key: g3 },
      { type: "sending", keys: [g3] },
      { type: "failed", key: g3, trouble: { kind: "stale", theirs: null } },
    );
    expect(row(back)).toMatchObject({ trouble: null, version: 0, saved: null, removed: false });
  });
});

describe("undo", () => {
  it("takes back numbers, decisions and whole pastes, one step each", () => {
    const pasted: SheetAction = {
      type: "enter",
      unit: "cents",
      rows: [
        { place: G3, values: [{ partial: 1, text: "1.0" }], whole: true },
        { place: A4, values: [{ partial: 1, text: "2.0" }], whole: true },
      ],
    };
    const state = run(
      withG3,
      type(1, "3.3"),
      settle,
      { type: "judge", key: g3, partial: 2, keep: false },
      pasted,
    );
    expect(Object.keys(row(state).cells)).toEqual(["1"]);
    const one = run(state, { type: "undo", key: null });
    expect(one.rows[a4]).toBeUndefined();
    expect(row(one).dropped).toEqual([2]);
    const two = run(one, { type: "undo", key: g3 });
    expect(row(two).dropped).toEqual([]);
    expect(text(two, 1)).toBe("3.3");
    expect(text(run(two, { type: "undo", key: g3 }), 1)).toBe("+2.8");
  });

  it("brings a removed note back, before and after the server has heard of it", () => {
    const removed = run(withG3, { type: "remove", key: g3 });
    expect(shownRows(removed)).toEqual([]);
    expect(isChanged(row(removed), 440)).toBe(true);
    expect(isChanged(row(run(removed, { type: "undo", key: g3 })), 440)).toBe(false);

    const gone = run(removed, { type: "sending", keys: [g3] }, { type: "gone", key: g3 });
    expect(gone.rows[g3]).toBeUndefined();
    const back = run(gone, { type: "undo", key: null });
    expect(text(back, 1)).toBe("+2.8");
    expect(inputOf(row(back), 440).version).toBe(0);
    expect(isWhole(row(back), 440)).toBe(true);
  });

  it("takes a note off again that was empty before it was saved", () => {
    const typedIn = run(empty, { type: "choose", place: G3 }, type(1, "2.8"), settle);
    const saved = run(typedIn, { type: "saved", key: g3, record: note(55, [2.8]) });
    const back = run(saved, { type: "undo", key: g3 });
    expect(row(back).removed).toBe(true);
    expect(shownRows(back)).toEqual([]);
    expect(isChanged(row(back), 440)).toBe(true);
  });

  it("writes a note again whose removal was undone while it was on its way", () => {
    const state = run(
      withG3,
      { type: "remove", key: g3 },
      { type: "sending", keys: [g3] },
      { type: "undo", key: g3 },
      { type: "gone", key: g3 },
    );
    expect(row(state)).toMatchObject({ saved: null, version: 0, removed: false });
    expect(isChanged(row(state), 440)).toBe(true);
  });

  it("shows a note again whose removal was refused", () => {
    const state = run(
      withG3,
      { type: "remove", key: g3 },
      { type: "sending", keys: [g3] },
      {
        type: "failed",
        key: g3,
        trouble: { kind: "refused", message: "You can read it, not change it." },
      },
    );
    expect(shownRows(state)).toHaveLength(1);
    expect(isChanged(row(state), 440)).toBe(false);
  });
});

describe("a reload", () => {
  it("brings back what was typed, bad text too, on the version it was typed on", () => {
    const before = run(withG3, type(5, "7..2"), settle, type(1, "2.0", A4));
    const kept = JSON.parse(JSON.stringify(keptDrafts(before)));
    const after = run(sheetState(440, [note(55, [2.8, 3.9, 4.7, 4.9], 4)]), {
      type: "restore",
      drafts: kept,
    });
    expect(text(after, 5)).toBe("7..2");
    expect(text(after, 1, a4)).toBe("2.0");
    expect(row(after).version).toBe(1);
  });

  it("drops a draft that was saved after all", () => {
    const before = run(withG3, type(5, "7.2"), settle);
    const saved = sheetState(440, [note(55, [2.8, 3.9, 4.7, 4.9, 7.2], 2)]);
    const after = run(saved, { type: "restore", drafts: keptDrafts(before) });
    expect(row(after).version).toBe(2);
    expect(keptDrafts(after)).toEqual([]);
  });
});

describe("rows on the page", () => {
  it("stand in the order of the keys, and a note begun at the foot does not jump under the hands", () => {
    const state = run(sheetState(440, [note(69, [1, 2, 3])]), { type: "choose", place: G3 });
    expect(state.order).toEqual([g3, a4]);
    const atEnd = run(sheetState(440, [note(69, [1, 2, 3])]), { type: "choose", place: G3, atEnd: true });
    expect(atEnd.order).toEqual([a4, g3]);
  });
});

describe("the fit while typing", () => {
  const around: Around = {
    referenceHz: 440,
    range: { firstMidi: 21, lastMidi: 108, breakMidi: 41 },
    notes: [],
  };
  const cents = ["2.8", "3.9", "4.7", "4.9", "7.2"];
  const state = run(empty, ...cents.flatMap((value, index) => [type(index + 1, value), settle]));

  it("is the server's own code on the settled readings", () => {
    const live = liveOf(row(state), around);
    const readings = cents.map((value, index) => ({
      partial: index + 1,
      hz: readingHz({ partial: index + 1, cents: Number(value) }, 55, 440),
    }));
    expect(live.authoritative).toBe(false);
    expect(live.fit).toEqual(fit({ midi: 55, referenceHz: 440, kept: [], dropped: [], readings }));
  });

  it("leaves out what is asked about until it is confirmed", () => {
    const far = run(state, type(6, "412"), settle);
    const live = liveOf(row(far), around);
    expect(live.questions).toMatchObject([{ partial: 6 }]);
    expect(live.fit?.residuals.map(({ partial }) => partial)).toEqual([1, 2, 3, 4, 5]);
    const confirmed = liveOf(row(run(far, { type: "confirm", key: g3, partial: 6 })), around);
    expect(confirmed.questions).toEqual([]);
    expect(confirmed.fit?.residuals).toHaveLength(6);
  });

  it("gives way to the server's answer", () => {
    const record = note(55, cents.map(Number));
    const live = liveOf(row(run(state, { type: "saved", key: g3, record })), around);
    expect(live).toMatchObject({ authoritative: true, fit: { b: record.b } });
  });
});
