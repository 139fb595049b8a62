import { and, asc, eq, inArray, isNull, sql } from "drizzle-orm";
import type { Handle } from "@/db/client";
import { noteReading, readingSheet, stretchPlan } from "@/db/schema";
import type { Quality } from "@/lib/acoustics/types";

/** Sheets of these jobs with what the room was like, oldest first. */
export async function sheetsWithClimate(db: Handle, shopId: string, jobIds: readonly string[]) {
  if (jobIds.length === 0) return [];
  return db
    .select({
      id: readingSheet.id,
      jobId: readingSheet.jobId,
      stage: readingSheet.stage,
      takenAt: readingSheet.takenAt,
      referenceHz: readingSheet.referenceHz,
      humidityPercent: readingSheet.humidityPercent,
      temperatureC: readingSheet.temperatureC,
    })
    .from(readingSheet)
    .where(
      and(
        eq(readingSheet.shopId, shopId),
        inArray(readingSheet.jobId, [...jobIds]),
        isNull(readingSheet.archivedAt),
      ),
    )
    .orderBy(asc(readingSheet.takenAt), asc(readingSheet.id));
}

/** The notes of several sheets without their readings: pitch, B and how far each fit can be relied on. */
export async function fittedNotesOf(db: Handle, shopId: string, sheetIds: readonly string[]) {
  if (sheetIds.length === 0) return [];
  return db
    .select({
      sheetId: noteReading.sheetId,
      midi: noteReading.midi,
      string: noteReading.string,
      f1Hz: noteReading.f1Hz,
      b: noteReading.b,
      bSigma: noteReading.bSigma,
      rmsCents: sql<number>`(${noteReading.fit} ->> 'rmsCents')::float8`,
      quality: sql<Quality>`${noteReading.fit} ->> 'quality'`,
    })
    .from(noteReading)
    .where(and(eq(noteReading.shopId, shopId), inArray(noteReading.sheetId, [...sheetIds])))
    .orderBy(asc(noteReading.midi), asc(noteReading.string), asc(noteReading.take));
}

/** The plan kept for each of these jobs: one a job at most. */
export async function keptPlansOf(db: Handle, shopId: string, jobIds: readonly string[]) {
  if (jobIds.length === 0) return [];
  return db
    .select({
      jobId: stretchPlan.jobId,
      sheetId: stretchPlan.sheetId,
      styleName: stretchPlan.styleName,
      temperament: stretchPlan.temperament,
      referenceHz: stretchPlan.referenceHz,
      createdAt: stretchPlan.createdAt,
    })
    .from(stretchPlan)
    .where(
      and(
        eq(stretchPlan.shopId, shopId),
        inArray(stretchPlan.jobId, [...jobIds]),
        isNull(stretchPlan.supersededAt),
      ),
    );
}
