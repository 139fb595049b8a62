// @vitest-environment happy-dom
import { act } from "react";
import { createRoot, type Root } from "react-dom/client";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import type { ActionResult } from "@/lib/doors/action-result";
import type { StringRecord } from "@/lib/instruments/schema";
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

let root: Root;
let host: HTMLElement;

beforeEach(() => {
  Reflect.set(globalThis, "IS_REACT_ACT_ENVIRONMENT", true);
  host = document.createElement("div");
  document.body.append(host);
  root = createRoot(host);
});
afterEach(() => {
  act(() => root.unmount());
  host.remove();
});

function makeActions(more: Partial<StringActions> = {}) {
  return {
    save: vi.fn<StringActions["save"]>(async () => ({ ok: true, data: record(69, { version: 2 }) })),
    saveAll: vi.fn<StringActions["saveAll"]>(async () => ({ ok: true, data: { items: [] } })),
    remove: vi.fn<StringActions["remove"]>(async () => ({ ok: true, data: { midi: 69 } })),
    ...more,
  };
}

async function show(actions: StringActions, saved = [record(69)]) {
  await act(async () =>
    root.render(
      <StringsTable
        instrument={{ id: "piano", firstMidi: 68, lastMidi: 71 }}
        saved={saved}
        actions={actions}
        canChange
      />,
    ),
  );
}

function field(midi: number, name: string): HTMLInputElement {
  const found = host.querySelector<HTMLInputElement>(`[data-midi="${midi}"][data-field="${name}"]`);
  if (!found) throw new Error(`no ${name} of ${midi}`);
  return found;
}

async function type(element: HTMLInputElement | HTMLTextAreaElement, text: string) {
  await act(async () => {
    Object.getOwnPropertyDescriptor(Object.getPrototypeOf(element), "value")?.set?.call(element, text);
    element.dispatchEvent(new Event("input", { bubbles: true }));
  });
}

async function leave(midi: number) {
  await act(async () => {
    field(midi, "strings").dispatchEvent(new FocusEvent("focusout", { bubbles: true }));
    await new Promise((done) => setTimeout(done, 5));
  });
}

const stateOf = (midi: number) =>
  host.querySelector(`tr[data-row="${midi}"] td:last-child svg`)?.getAttribute("aria-label");

async function press(words: string) {
  const button = [...host.querySelectorAll("button")].find(({ textContent }) => textContent === words);
  if (!button) throw new Error(`no button ${words}`);
  await act(async () => {
    button.click();
    await new Promise((done) => setTimeout(done, 5));
  });
}

describe("two people at one scale", () => {
  it("names the version it changed, and the next one after it was saved", async () => {
    const actions = makeActions();
    await show(actions);
    await type(field(69, "diameterMm"), "0.95");
    await leave(69);
    expect(actions.save).toHaveBeenLastCalledWith(
      expect.objectContaining({ values: expect.objectContaining({ diameterMm: 0.95, version: 1 }) }),
    );
    expect(stateOf(69)).toBe("saved");
    await type(field(69, "diameterMm"), "0.975");
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
    await type(field(69, "diameterMm"), "0,95");
    await leave(69);
    expect(field(69, "diameterMm").value).toBe("0,95");
    expect(host.textContent).toContain("2 plain strings, 402 mm long, wire 0.9 mm");
    // Leaving once more is no answer to the question.
    await leave(69);
    expect(actions.save).toHaveBeenCalledTimes(1);
    await press("Save mine over it");
    expect(actions.save).toHaveBeenLastCalledWith(
      expect.objectContaining({ values: expect.objectContaining({ diameterMm: 0.95, version: 4 }) }),
    );
    expect(stateOf(69)).toBe("saved");
    expect(field(69, "diameterMm").value).toBe("0,95");
  });

  it("takes the other's note where that is chosen, also where it was taken away", async () => {
    const actions = makeActions({ save: vi.fn(async () => stale([69], [])) });
    await show(actions);
    await type(field(69, "diameterMm"), "0.95");
    await leave(69);
    expect(host.textContent).toContain("Somebody took this note away meanwhile.");
    await press("Take theirs");
    expect(field(69, "diameterMm").value).toBe("");
    expect(actions.save).toHaveBeenCalledTimes(1);
  });

  it("does not call saved what was typed while the row before it was on its way", async () => {
    let answer: (result: ActionResult<StringRecord>) => void = () => {};
    const actions = makeActions({
      save: vi.fn<StringActions["save"]>(() => new Promise((done) => (answer = done))),
    });
    await show(actions);
    await type(field(69, "diameterMm"), "0.95");
    await leave(69);
    await type(field(69, "diameterMm"), "0.975");
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
    const box = host.querySelector("textarea");
    if (!box) throw new Error("no box to paste into");
    await type(box, "A4\t1\tplain\t400\t1\nA#4\t3\tplain\t380\t1");
    await press("Put them in");
    expect(actions.saveAll).toHaveBeenCalledTimes(2);
    expect(stateOf(70)).toBe("saved");
    expect(field(69, "strings").value).toBe("1");
    expect(host.textContent).toContain("Somebody saved this note meanwhile: 2 plain strings");
  });
});
