// @vitest-environment happy-dom
import { QueryClient, QueryClientProvider } from "@tanstack/react-query";
import { type Dispatch, useReducer } from "react";
import { createRoot, type Root } from "react-dom/client";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { fit } from "@/lib/acoustics";
import type { NoteInput, NoteRecord } from "@/lib/readings/schema";
import type { SheetState } from "./sheet-rows";
import { type SheetAction, sheetReducer, sheetState } from "./sheet-state";
import { useSheetSaver } from "./use-sheet-saver";

type Sent = { url: string; notes: (NoteInput & { midi: number })[] };

/** A server of one sheet: versions counted, a stale one refused. */
const stored = new Map<number, NoteRecord>();
let sent: Sent[];
let loseAnswers: boolean;

function keep({ midi, readings, kept, dropped }: Sent["notes"][number]): NoteRecord {
  const record: NoteRecord = {
    ...fit({ midi, readings: readings.map(({ partial, hz }) => ({ partial, hz: hz ?? 0 })) }),
    id: `00000000-0000-7000-8000-0000000000${midi}`,
    midi,
    string: "all",
    take: 1,
    readings: readings.map(({ partial, hz }) => ({ partial, hz: hz ?? 0, sigmaCents: null })),
    kept,
    dropped,
    fitVersion: 1,
    version: (stored.get(midi)?.version ?? 0) + 1,
  };
  stored.set(midi, record);
  return record;
}

async function server(url: string, init: RequestInit): Promise<Response> {
  const body = JSON.parse(String(init.body));
  const notes = body.notes ?? [{ ...body, midi: Number(url.split("/").at(-1)) }];
  sent.push({ url, notes });
  const stale = notes.find(
    (note: Sent["notes"][number]) => note.version !== (stored.get(note.midi)?.version ?? 0),
  );
  if (stale) {
    const problem = { title: "Stale", code: "stale", current: stored.get(stale.midi) ?? null };
    return Response.json(problem, { status: 409 });
  }
  const items = notes.map(keep);
  if (loseAnswers) throw new TypeError("the line broke");
  return Response.json(body.notes ? { items } : items[0]);
}

let root: Root;
let drawn: { state: SheetState; dispatch: Dispatch<SheetAction> } | null;

function Sheet() {
  const [state, dispatch] = useReducer(sheetReducer, sheetState(440, []));
  useSheetSaver({
    sheetId: "s",
    state,
    dispatch,
    liveOf: () => ({ fit: null, questions: [], authoritative: false }),
  });
  drawn = { state, dispatch };
  return null;
}

beforeEach(async () => {
  Reflect.set(globalThis, "IS_REACT_ACT_ENVIRONMENT", false);
  vi.stubGlobal("fetch", server);
  stored.clear();
  sent = [];
  loseAnswers = false;
  drawn = null;
  const host = document.createElement("div");
  root = createRoot(host);
  root.render(
    <QueryClientProvider client={new QueryClient()}>
      <Sheet />
    </QueryClientProvider>,
  );
  await vi.waitFor(() => expect(drawn).not.toBeNull());
});

afterEach(() => {
  root.unmount();
  vi.unstubAllGlobals();
});

const row = (midi: number, ...cents: string[]) => ({
  place: { midi, string: "all" as const, take: 1 },
  values: cents.map((text, index) => ({ partial: index + 1, text })),
  whole: true,
});

const a3 = () => drawn?.state.rows["57-all-1"];
/** Longer than any row's clock. */
const rest = () => new Promise((resolve) => setTimeout(resolve, 1_500));

describe("saving what was pasted", () => {
  it("sends two rows once, together", async () => {
    drawn?.dispatch({ type: "enter", unit: "cents", rows: [row(57, "0.1", "0.9"), row(69, "0.2", "1.4")] });
    await vi.waitFor(() => expect(stored.size).toBe(2));
    await rest();
    expect(sent.map(({ notes }) => notes.map(({ midi }) => midi))).toEqual([[57, 69]]);
  });

  it("sends a row changed meanwhile once more, on its new version", async () => {
    drawn?.dispatch({ type: "enter", unit: "cents", rows: [row(57, "0.1", "0.9")] });
    await vi.waitFor(() => expect(a3()?.version).toBe(1));
    drawn?.dispatch({ type: "enter", unit: "cents", rows: [row(57, "0.1", "1.0")] });
    await vi.waitFor(() => expect(a3()?.version).toBe(2));
    await rest();
    expect(sent).toHaveLength(2);
  });
});

describe("one's own write", () => {
  it("is no clash when its answer was lost and the row was changed since", async () => {
    loseAnswers = true;
    drawn?.dispatch({ type: "enter", unit: "cents", rows: [row(57, "0.1", "0.9")] });
    await vi.waitFor(() => expect(a3()?.trouble).toEqual({ kind: "network" }));
    loseAnswers = false;
    drawn?.dispatch({ type: "enter", unit: "cents", rows: [row(57, "0.1", "0.9", "2.0")] });
    await vi.waitFor(() => expect(a3()?.version).toBe(2));
    expect(a3()).toMatchObject({ trouble: null, sending: false, sent: [] });
    expect(stored.get(57)?.readings).toHaveLength(3);
  });

  it("is told from somebody else's", async () => {
    keep({
      midi: 57,
      string: "all",
      take: 1,
      readings: [{ partial: 1, hz: 221 }],
      kept: [],
      dropped: [],
      confirmed: [],
    });
    drawn?.dispatch({ type: "enter", unit: "cents", rows: [row(57, "0.1", "0.9")] });
    await vi.waitFor(() => expect(a3()?.trouble).toMatchObject({ kind: "stale" }));
    expect(stored.get(57)?.version).toBe(1);
  });
});
