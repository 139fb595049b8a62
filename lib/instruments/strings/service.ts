import "server-only";
import { type Tx, withShop } from "@/db/client";
import { deleteString, putStrings, stringsOf } from "@/db/queries/instrument-strings";
import { keyName } from "@/lib/acoustics/keys";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import { notFound } from "@/lib/errors";
import type { InstrumentRecord, StringInput, StringRecord, StringsInput } from "../schema";
import { instrumentToChange, readInstrument, refuse } from "../service";

export async function findStrings(
  actor: Actor,
  instrumentId: string,
): Promise<{ items: StringRecord[]; next: null }> {
  authorise(actor, "instruments.read");
  return withShop(actor, async (tx) => {
    await readInstrument(tx, actor, instrumentId);
    return { items: await stringsOf(tx, actor.shopId, instrumentId), next: null };
  });
}

export async function saveString(
  actor: Actor,
  instrumentId: string,
  midi: number,
  values: StringInput,
): Promise<StringRecord> {
  const [saved] = await save(actor, instrumentId, [{ midi, values }], () => "midi");
  if (!saved) throw notFound("note");
  return saved;
}

/** A pasted scale: every row is checked first, and all are saved or none. */
export async function saveStrings(
  actor: Actor,
  instrumentId: string,
  { rows }: StringsInput,
): Promise<{ items: StringRecord[]; next: null }> {
  return { items: await save(actor, instrumentId, rows, (index) => `rows.${index}.midi`), next: null };
}

export async function removeString(actor: Actor, instrumentId: string, midi: number): Promise<void> {
  authorise(actor, "instruments.change");
  await withShop(actor, async (tx) => {
    await instrumentToChange(tx, actor, instrumentId, "instruments.change");
    if (!(await deleteString(tx, actor.shopId, instrumentId, midi))) throw notFound("note");
  });
}

async function save(
  actor: Actor,
  instrumentId: string,
  rows: StringsInput["rows"],
  pathOf: (index: number) => string,
): Promise<StringRecord[]> {
  authorise(actor, "instruments.change");
  return withShop(actor, async (tx) => {
    const record = await instrumentToChange(tx, actor, instrumentId, "instruments.change");
    refuse(outOfRange(record, rows, pathOf));
    // The last of two rows for one note counts: an upsert may touch a row only once.
    const byNote = new Map(rows.map((row) => [row.midi, row]));
    await putStrings(tx, actor.shopId, instrumentId, [...byNote.values()]);
    return savedOf(tx, actor, instrumentId, byNote);
  });
}

async function savedOf(tx: Tx, actor: Actor, instrumentId: string, wanted: ReadonlyMap<number, unknown>) {
  const all = await stringsOf(tx, actor.shopId, instrumentId);
  return all.filter((row) => wanted.has(row.midi));
}

function outOfRange(
  { firstMidi, lastMidi }: InstrumentRecord,
  rows: StringsInput["rows"],
  pathOf: (index: number) => string,
): Record<string, string> {
  return Object.fromEntries(
    rows.flatMap(({ midi }, index) =>
      midi < firstMidi || midi > lastMidi
        ? [
            [
              pathOf(index),
              `This instrument has no ${keyName(midi)}: it goes from ${keyName(firstMidi)} to ${keyName(lastMidi)}.`,
            ],
          ]
        : [],
    ),
  );
}
