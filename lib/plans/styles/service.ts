import "server-only";
import { withShop } from "@/db/client";
import { defaultStyleOf } from "@/db/queries/plans";
import { fullestSheets, notesOfSheet } from "@/db/queries/readings";
import { insertStyle, listStyles, styleById, updateStyle } from "@/db/queries/styles";
import { may } from "@/lib/auth/access";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import { isUniqueViolation } from "@/lib/database-errors";
import { AppError, invalid, notFound, stale } from "@/lib/errors";
import { newId } from "@/lib/ids";
import { observationsOf } from "@/lib/readings/rules";
import { sheetName } from "@/lib/readings/stage-words";
import { clockWithin } from "@/lib/shop-clock/service";
import { builtInNames, builtInWords } from "../rules";
import type { NewStyle, PreviewInstrument, StyleChange, StyleList, StyleRecord } from "../schema";

type Row = NonNullable<Awaited<ReturnType<typeof styleById>>>;

function record(row: Row): StyleRecord {
  return { ...row, archivedAt: row.archivedAt?.toISOString() ?? null };
}

const nameTaken = () => invalid({ name: "Another style of this shop has this name." });

export async function getStyles(actor: Actor): Promise<StyleList> {
  authorise(actor, "styles.read");
  return withShop(actor, async (tx) => ({
    builtIn: builtInNames.map((name) => ({ name, words: builtInWords[name].words })),
    house: (await listStyles(tx, actor.shopId)).map(record),
    defaultStyle: await defaultStyleOf(tx, actor.shopId),
    canChange: may(actor.role, "styles.change"),
  }));
}

export async function createStyle(actor: Actor, { id = newId(), ...fields }: NewStyle): Promise<StyleRecord> {
  authorise(actor, "styles.change");
  try {
    return await withShop(actor, async (tx) => {
      const row =
        (await insertStyle(tx, actor.shopId, id, fields)) ?? (await styleById(tx, actor.shopId, id));
      if (!row) throw new AppError("id-in-use", "This id is taken. Send the style with another one.");
      return record(row);
    });
  } catch (error) {
    throw isUniqueViolation(error, "house_style_name") ? nameTaken() : error;
  }
}

export async function changeStyle(
  actor: Actor,
  id: string,
  { version, archived, ...fields }: StyleChange,
): Promise<StyleRecord> {
  authorise(actor, "styles.change");
  try {
    return await withShop(actor, async (tx) => {
      const row = await updateStyle(tx, actor.shopId, id, version, {
        ...fields,
        ...(archived === undefined ? {} : { archivedAt: archived ? new Date() : null }),
      });
      if (row) return record(row);
      const current = await styleById(tx, actor.shopId, id);
      throw current ? stale("style", record(current)) : notFound("style");
    });
  } catch (error) {
    throw isUniqueViolation(error, "house_style_name") ? nameTaken() : error;
  }
}

/** So many instruments are offered to try a style on. */
const MOST_PREVIEWS = 12;
/** One instrument may fill the first places with its own sheets. */
const MOST_SHEETS = 120;

/** The shop's instruments with the most notes read, most first, each by its fullest sheet. */
export async function previewInstruments(actor: Actor): Promise<PreviewInstrument[]> {
  authorise(actor, "styles.read");
  return withShop(actor, async (tx) => {
    const { locale, timeZone } = await clockWithin(tx, actor.shopId);
    const seen = new Set<string>();
    const previews: PreviewInstrument[] = [];
    for (const sheet of await fullestSheets(tx, actor.shopId, MOST_SHEETS)) {
      if (seen.has(sheet.instrumentId) || previews.length === MOST_PREVIEWS) continue;
      seen.add(sheet.instrumentId);
      const { takenAt, stage, ...rest } = sheet;
      const notes = await notesOfSheet(tx, actor.shopId, sheet.sheetId);
      const inRange = notes.filter(({ midi }) => midi >= sheet.firstMidi && midi <= sheet.lastMidi);
      previews.push({
        ...rest,
        sheetName: sheetName({ stage, takenAt: takenAt.toISOString() }, locale, timeZone),
        observations: observationsOf(inRange.map(({ midi, fit }) => ({ ...fit, midi }))),
      });
    }
    return previews;
  });
}
