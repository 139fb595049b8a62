import "server-only";
import { withShop } from "@/db/client";
import { deleteString, lockScale, putStrings, stringsOf } from "@/db/queries/instrument-strings";
import { keyName } from "@/lib/acoustics/keys";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import { notFound, stale } from "@/lib/errors";
import type { ChangedStrings, InstrumentRecord, StringInput, StringRecord, StringsInput } from "../schema";
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

export async function removeString(
  actor: Actor,
  instrumentId: string,
  midi: number,
  version?: number,
): Promise<void> {
  authorise(actor, "instruments.change");
  await withShop(actor, async (tx) => {
    await instrumentToChange(tx, actor, instrumentId, "instruments.change");
    await lockScale(tx, actor.shopId, instrumentId);
    const stored = (await stringsOf(tx, actor.shopId, instrumentId)).find((row) => row.midi === midi);
    if (!stored) throw notFound("note");
    if (version !== undefined && version !== stored.version) {
      throw stale("note", { midis: [midi], items: [stored] } satisfies ChangedStrings);
    }
    await deleteString(tx, actor.shopId, instrumentId, midi);
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
    await lockScale(tx, actor.shopId, instrumentId);
    // The last of two rows for one note counts: an upsert may touch a row only once.
    const byNote = new Map(rows.map((row) => [row.midi, row]));
    refuseStale([...byNote.values()], await stringsOf(tx, actor.shopId, instrumentId));
    await putStrings(tx, actor.shopId, instrumentId, [...byNote.values()]);
    const all = await stringsOf(tx, actor.shopId, instrumentId);
    return all.filter((row) => byNote.has(row.midi));
  });
}

function refuseStale(rows: StringsInput["rows"], stored: readonly StringRecord[]): void {
  const byNote = new Map(stored.map((row) => [row.midi, row]));
  const changed = rows.filter(({ midi, values }) => {
    const there = byNote.get(midi);
    if (values.version === undefined || values.version === (there?.version ?? 0)) return false;
    // The answer to the first sending may have been lost on the way; the same strings again are no change.
    return !there || !sameStrings(there, values);
  });
  if (changed.length === 0) return;
  const midis = changed.map(({ midi }) => midi);
  throw stale(changed.length === 1 ? "note" : "scale", {
    midis,
    items: midis.flatMap((midi) => byNote.get(midi) ?? []),
  } satisfies ChangedStrings);
}

function sameStrings(stored: StringRecord, values: StringInput): boolean {
  return (
    stored.strings === values.strings &&
    stored.wound === values.wound &&
    stored.speakingLengthMm === (values.speakingLengthMm ?? null) &&
    stored.diameterMm === (values.diameterMm ?? null) &&
    stored.outerDiameterMm === (values.outerDiameterMm ?? null)
  );
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
