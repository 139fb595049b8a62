// @vitest-environment happy-dom
import { act } from "react";
import { describe, expect, it, vi } from "vitest";
import type { ActionResult } from "@/lib/doors/action-result";
import type { StringRecord } from "@/lib/instruments/schema";
import { mounted } from "../../tests/support/mounted";
import { StringsTable } from "./strings-table";
import type { StringActions } from "./use-strings";

const record = (midi: number, more: Partial<StringRecord> = {}): StringRecord => ({
  midi,
  strings: 3,
  wound: false,
  speakingLengthMm: 402,
  diameterMm: 1,
  outerDiameterMm: null,
  version: 1,
  ...more,
});

const stale = (midis: number[], items: StringRecord[]): Extract<ActionResult<never>, { ok: false }> => ({
  ok: false,
  error: { code: "stale", message: "Somebody changed this note meanwhile.", current: { midis, items } },
});

const page = mounted();

function makeActions(more: Partial<StringActions> = {}) {
  return {
    save: vi.fn<StringActions["save"]>(async () => ({ ok: true, data: record(69, { version: 2 }) })),
    saveAll: vi.fn<StringActions["saveAll"]>(async () => ({ ok: true, data: { items: [] } })),
    remove: vi.fn<StringActions["remove"]>(async () => ({ ok: true, data: { midi: 69 } })),
    ...more,
  };
}

async function show(actions: StringActions, saved = [record(69)]) {
  await page.show(
    <StringsTable
      instrument={{ id: "piano", firstMidi: 68, lastMidi: 71 }}
      saved={saved}
      actions={actions}
      canChange
    />,
  );
}

const field = (midi: number, name: string) => page.field(`[data-midi="${midi}"][data-field="${name}"]`);

async function leave(midi: number) {
  await act(async () => {
    field(midi, "strings").dispatchEvent(new FocusEvent("focusout", { bubbles: true }));
    await new Promise((done) => setTimeout(done, 5));
  });
}

const stateOf = (midi: number) =>
  page.host().querySelector(`tr[data-row="${midi}"] td:last-child svg`)?.getAttribute("aria-label");

describe("two people at one scale", () => {
  it("names the version it changed, and the next one after it was saved", async () => {
    const actions = makeActions();
    await show(actions);
    await page.type(field(69, "diameterMm"), "0.95");
    await leave(69);
    expect(actions.save).toHaveBeenLastCalledWith(
      expect.objectContaining({ values: expect.objectContaining({ diameterMm: 0.95, version: 1 }) }),
    );
    expect(stateOf(69)).toBe("saved");
    await page.type(field(69, "diameterMm"), "0.975");
    await leave(69);
    expect(actions.save).toHaveBeenLastCalledWith(
      expect.objectContaining({ values: expect.objectContaining({ diameterMm: 0.975, version: 2 }) }),
    );
  });

  it("says what the other saved and keeps what was typed, until one is chosen", async () => {
    const theirs = record(69, { strings: 2, diameterMm: 0.9, version: 4 });
    const answers: ActionResult<StringRecord>[] = [
      stale([69], [theirs]),
      { ok: true, data: record(69, { diameterMm: 0.95, version: 5 }) },
    ];
    const actions = makeActions({ save: vi.fn(async () => answers.shift() ?? stale([69], [theirs])) });
    await show(actions);
    await page.type(field(69, "diameterMm"), "0,95");
    await leave(69);
    expect(field(69, "diameterMm").value).toBe("0,95");
    expect(page.host().textContent).toContain("2 plain strings, 402 mm long, wire 0.9 mm");
    // Leaving once more is no answer to the question.
    await leave(69);
    expect(actions.save).toHaveBeenCalledTimes(1);
    await page.press("Save mine over it");
    expect(actions.save).toHaveBeenLastCalledWith(
      expect.objectContaining({ values: expect.objectContaining({ diameterMm: 0.95, version: 4 }) }),
    );
    expect(stateOf(69)).toBe("saved");
    expect(field(69, "diameterMm").value).toBe("0,95");
  });

  it("takes the other's note where that is chosen, also where it was taken away", async () => {
    const actions = makeActions({ save: vi.fn(async () => stale([69], [])) });
    await show(actions);
    await page.type(field(69, "diameterMm"), "0.95");
    await leave(69);
    expect(page.host().textContent).toContain("Somebody took this note away meanwhile.");
    await page.press("Take theirs");
    expect(field(69, "diameterMm").value).toBe("");
    expect(actions.save).toHaveBeenCalledTimes(1);
  });

  it("does not call saved what was typed while the row before it was on its way", async () => {
    let answer: (result: ActionResult<StringRecord>) => void = () => {};
    const actions = makeActions({
      save: vi.fn<StringActions["save"]>(() => new Promise((done) => (answer = done))),
    });
    await show(actions);
    await page.type(field(69, "diameterMm"), "0.95");
    await leave(69);
    await page.type(field(69, "diameterMm"), "0.975");
    await act(async () => answer({ ok: true, data: record(69, { diameterMm: 0.95, version: 2 }) }));
    expect(field(69, "diameterMm").value).toBe("0.975");
    expect(stateOf(69)).toBe("not saved yet");
  });

  it("saves the rest of a pasted scale and asks about the notes that changed meanwhile", async () => {
    const theirs = record(69, { strings: 2, version: 2 });
    const answers: ActionResult<{ items: StringRecord[] }>[] = [
      stale([69], [theirs]),
      { ok: true, data: { items: [record(70)] } },
    ];
    const actions = makeActions({
      saveAll: vi.fn(async () => answers.shift() ?? stale([], [])),
    });
    await show(actions);
    const box = page.host().querySelector("textarea");
    if (!box) throw new Error("no box to paste into");
    await page.type(box, "A4\t1\tplain\t400\t1\nA#4\t3\tplain\t380\t1");
    await page.press("Put them in");
    expect(actions.saveAll).toHaveBeenCalledTimes(2);
    expect(stateOf(70)).toBe("saved");
    expect(field(69, "strings").value).toBe("1");
    expect(page.host().textContent).toContain("Somebody saved this note meanwhile: 2 plain strings");
  });
});
