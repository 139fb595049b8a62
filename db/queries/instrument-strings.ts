import { and, asc, eq, sql } from "drizzle-orm";
import type { Handle } from "@/db/client";
import { instrument, instrumentString } from "@/db/schema";
import type { StringInput } from "@/lib/instruments/schema";

export async function stringsOf(db: Handle, shopId: string, instrumentId: string) {
  return db
    .select({
      midi: instrumentString.midi,
      strings: instrumentString.strings,
      wound: instrumentString.wound,
      speakingLengthMm: instrumentString.speakingLengthMm,
      diameterMm: instrumentString.diameterMm,
      outerDiameterMm: instrumentString.outerDiameterMm,
      version: instrumentString.version,
    })
    .from(instrumentString)
    .where(and(eq(instrumentString.shopId, shopId), eq(instrumentString.instrumentId, instrumentId)))
    .orderBy(asc(instrumentString.midi));
}

/** Two writers of one scale wait for each other here, so that each sees what the other wrote. */
export async function lockScale(db: Handle, shopId: string, instrumentId: string): Promise<void> {
  await db
    .select({ id: instrument.id })
    .from(instrument)
    .where(and(eq(instrument.shopId, shopId), eq(instrument.id, instrumentId)))
    .for("no key update");
}

/** A note has one row, so saving it again replaces it; what is left out is not known any more. The same again is no change. */
export async function putStrings(
  db: Handle,
  shopId: string,
  instrumentId: string,
  rows: readonly { midi: number; values: StringInput }[],
): Promise<void> {
  await db
    .insert(instrumentString)
    .values(
      rows.map(({ midi, values }) => ({
        shopId,
        instrumentId,
        midi,
        strings: values.strings,
        wound: values.wound,
        speakingLengthMm: values.speakingLengthMm ?? null,
        diameterMm: values.diameterMm ?? null,
        outerDiameterMm: values.outerDiameterMm ?? null,
      })),
    )
    .onConflictDoUpdate({
      target: [instrumentString.shopId, instrumentString.instrumentId, instrumentString.midi],
      set: {
        strings: sql`excluded.strings`,
        wound: sql`excluded.wound`,
        speakingLengthMm: sql`excluded.speaking_length_mm`,
        diameterMm: sql`excluded.diameter_mm`,
        outerDiameterMm: sql`excluded.outer_diameter_mm`,
        version: sql`instrument_string.version + 1`,
        updatedAt: sql`now()`,
      },
      setWhere: sql`(instrument_string.strings, instrument_string.wound, instrument_string.speaking_length_mm,
        instrument_string.diameter_mm, instrument_string.outer_diameter_mm) is distinct from (excluded.strings,
        excluded.wound, excluded.speaking_length_mm, excluded.diameter_mm, excluded.outer_diameter_mm)`,
    });
}

export async function deleteString(
  db: Handle,
  shopId: string,
  instrumentId: string,
  midi: number,
): Promise<boolean> {
  const rows = await db
    .delete(instrumentString)
    .where(
      and(
        eq(instrumentString.shopId, shopId),
        eq(instrumentString.instrumentId, instrumentId),
        eq(instrumentString.midi, midi),
      ),
    )
    .returning({ midi: instrumentString.midi });
  return rows.length === 1;
}
