import "server-only";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import { getInstrument } from "@/lib/instruments/service";
import { getPlan } from "@/lib/plans/service";
import { getSheet } from "@/lib/readings/service";
import { csv } from "./csv";
import { fitColumns, fitRows, planColumns, planRows, readingColumns, readingRows } from "./rows";
import type { SheetExportQuery } from "./schema";

export type ExportedFile = { name: string; type: string; text: string };

function file(name: string, format: "csv" | "json", text: string): ExportedFile {
  const type = format === "csv" ? "text/csv; charset=utf-8" : "application/json";
  return { name: `${name}.${format}`, type, text };
}

/** "castellan-186-48213": two instruments read on one day keep their files apart. */
async function instrumentName(actor: Actor, instrumentId: string): Promise<string> {
  const { maker, model, serial } = await getInstrument(actor, instrumentId);
  return [maker, model, serial]
    .join(" ")
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, "-")
    .replace(/^-|-$/g, "");
}

export async function exportSheet(
  actor: Actor,
  sheetId: string,
  { format, what }: SheetExportQuery,
): Promise<ExportedFile> {
  authorise(actor, "export.readings");
  const sheet = await getSheet(actor, sheetId);
  const instrument = await instrumentName(actor, sheet.instrumentId);
  const name = `${instrument}-${what}-${sheet.stage}-${sheet.takenAt.slice(0, 10)}`;
  if (format === "json") {
    const { canChange: _, ...plain } = sheet;
    return file(name, format, JSON.stringify(what === "readings" ? plain : fitRows(sheet), null, 2));
  }
  return file(
    name,
    format,
    what === "readings" ? csv(readingRows(sheet), readingColumns) : csv(fitRows(sheet), fitColumns),
  );
}

export async function exportPlan(
  actor: Actor,
  planId: string,
  format: "csv" | "json",
): Promise<ExportedFile> {
  authorise(actor, "export.readings");
  const plan = await getPlan(actor, planId);
  const name = `${await instrumentName(actor, plan.instrumentId)}-plan-${plan.createdAt.slice(0, 10)}`;
  return file(
    name,
    format,
    format === "json" ? JSON.stringify(plan, null, 2) : csv(planRows(plan), planColumns),
  );
}
