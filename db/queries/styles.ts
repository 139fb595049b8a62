import { and, eq, isNull, sql } from "drizzle-orm";
import type { Handle } from "@/db/client";
import { houseStyle } from "@/db/schema";
import type { StyleFields } from "@/lib/plans/schema";

const columns = {
  id: houseStyle.id,
  name: houseStyle.name,
  intervals: houseStyle.intervals,
  smoothness: houseStyle.smoothness,
  toleranceCents: houseStyle.toleranceCents,
  archivedAt: houseStyle.archivedAt,
  version: houseStyle.version,
};

export function listStyles(db: Handle, shopId: string) {
  return db
    .select(columns)
    .from(houseStyle)
    .where(and(eq(houseStyle.shopId, shopId), isNull(houseStyle.archivedAt)))
    .orderBy(sql`lower(${houseStyle.name})`);
}

export async function styleById(db: Handle, shopId: string, id: string) {
  const [row] = await db
    .select(columns)
    .from(houseStyle)
    .where(and(eq(houseStyle.shopId, shopId), eq(houseStyle.id, id)));
  return row;
}

export async function insertStyle(db: Handle, shopId: string, id: string, fields: StyleFields) {
  const [row] = await db
    .insert(houseStyle)
    .values({ ...fields, shopId, id })
    .onConflictDoNothing({ target: [houseStyle.shopId, houseStyle.id] })
    .returning(columns);
  return row;
}

export async function updateStyle(
  db: Handle,
  shopId: string,
  id: string,
  version: number,
  fields: Partial<StyleFields> & { archivedAt?: Date | null },
) {
  const [row] = await db
    .update(houseStyle)
    .set({ ...fields, version: version + 1, updatedAt: sql`now()` })
    .where(and(eq(houseStyle.shopId, shopId), eq(houseStyle.id, id), eq(houseStyle.version, version)))
    .returning(columns);
  return row;
}
