import { readNumber } from "@/components/forms/use-action-form";
import { keyName } from "@/lib/acoustics/keys";
import type { FieldErrors } from "@/lib/errors";
import { type StringInput, type StringRecord, stringInput } from "@/lib/instruments/schema";
import { type PastedString, readWound } from "@/lib/instruments/strings/paste";

/** One note's row as typed. Text throughout, so that nothing typed is ever lost. */
export type StringRow = {
  midi: number;
  strings: string;
  wound: boolean;
  speakingLengthMm: string;
  diameterMm: string;
  outerDiameterMm: string;
  errors: FieldErrors;
  /** As somebody else saved this note meanwhile, null where they took it away; absent while nobody did. */
  newer?: StringRecord | null;
  state: "saved" | "typed" | "saving" | "refused" | "empty";
};

export type StringField = "strings" | "speakingLengthMm" | "diameterMm" | "outerDiameterMm";

export const stringColumns: ReadonlyArray<{ field: StringField; label: string; unit?: string }> = [
  { field: "strings", label: "Strings" },
  { field: "speakingLengthMm", label: "Speaking length", unit: "mm" },
  { field: "diameterMm", label: "Wire or core", unit: "mm" },
  { field: "outerDiameterMm", label: "Outer", unit: "mm" },
];

const shown = (value: number | null) => (value === null ? "" : String(value));

export function rowOf(record: StringRecord): StringRow {
  return {
    midi: record.midi,
    strings: String(record.strings),
    wound: record.wound,
    speakingLengthMm: shown(record.speakingLengthMm),
    diameterMm: shown(record.diameterMm),
    outerDiameterMm: shown(record.outerDiameterMm),
    errors: {},
    state: "saved",
  };
}

export function emptyRow(midi: number): StringRow {
  return {
    midi,
    strings: "",
    wound: false,
    speakingLengthMm: "",
    diameterMm: "",
    outerDiameterMm: "",
    errors: {},
    state: "empty",
  };
}

/** What a row says, whatever its state; "402,5" and "402.5" are the same. */
export function sameCells(one: StringRow, other: StringRow): boolean {
  return (
    one.wound === other.wound &&
    stringColumns.every(({ field }) => readNumber(one[field]) === readNumber(other[field]))
  );
}

/** "3 plain strings, 402 mm, 1 mm". */
export function stringWords(record: StringRecord): string {
  const { strings, wound, speakingLengthMm, diameterMm, outerDiameterMm } = record;
  return [
    `${strings} ${wound ? "wound" : "plain"} ${strings === 1 ? "string" : "strings"}`,
    speakingLengthMm !== null && `${speakingLengthMm} mm long`,
    diameterMm !== null && `${wound ? "core" : "wire"} ${diameterMm} mm`,
    outerDiameterMm !== null && `outer ${outerDiameterMm} mm`,
  ]
    .filter(Boolean)
    .join(", ");
}

export function isBlank(row: StringRow): boolean {
  return !row.wound && stringColumns.every(({ field }) => row[field].trim() === "");
}

/** What goes to the server, or what is wrong with the row. */
export function parseRow(row: StringRow): { values: StringInput } | { errors: FieldErrors } {
  const parsed = stringInput.safeParse({
    strings: readNumber(row.strings),
    wound: row.wound,
    speakingLengthMm: readNumber(row.speakingLengthMm) ?? null,
    diameterMm: readNumber(row.diameterMm) ?? null,
    outerDiameterMm: readNumber(row.outerDiameterMm) ?? null,
  });
  if (parsed.success) return { values: parsed.data };
  const errors: FieldErrors = {};
  for (const issue of parsed.error.issues) errors[issue.path.map(String).join(".")] ??= issue.message;
  return { errors };
}

export type PasteAnswer = { rows: StringRow[]; problems: string[] };

/** Pasted rows over the ones there are; what cannot be placed is said with its line. */
export function pasteOver(pasted: readonly PastedString[], first: number, last: number): PasteAnswer {
  const rows: StringRow[] = [];
  const problems: string[] = [];
  for (const line of pasted) {
    const wound = readWound(line.wound);
    if (line.midi === null) {
      problems.push(`Line ${line.line}: “${line.note}” is no note. Write A0, C#4, Eb3 or the MIDI number.`);
    } else if (line.midi < first || line.midi > last) {
      problems.push(`Line ${line.line}: this instrument has no ${keyName(line.midi)}.`);
    } else if (wound === null) {
      problems.push(`Line ${line.line}: “${line.wound}” is neither wound nor plain.`);
    } else {
      const { strings, speakingLengthMm, diameterMm, outerDiameterMm } = line;
      const row = { ...emptyRow(line.midi), strings, wound, speakingLengthMm, diameterMm, outerDiameterMm };
      const parsed = parseRow(row);
      rows.push({
        ...row,
        errors: "errors" in parsed ? parsed.errors : {},
        state: "errors" in parsed ? "refused" : "typed",
      });
    }
  }
  return { rows, problems };
}
