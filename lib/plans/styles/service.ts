import "server-only";
import { withShop } from "@/db/client";
import { defaultStyleOf } from "@/db/queries/plans";
import { insertStyle, listStyles, styleById, updateStyle } from "@/db/queries/styles";
import { may } from "@/lib/auth/access";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import { isUniqueViolation } from "@/lib/database-errors";
import { AppError, invalid, notFound, stale } from "@/lib/errors";
import { newId } from "@/lib/ids";
import { builtInNames, builtInWords } from "../rules";
import type { NewStyle, StyleChange, StyleList, StyleRecord } from "../schema";

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
