import Papa from "papaparse";
import { centsBetween, equalTemperedHz, keyFromName, keyName, STANDARD_PITCH_HZ } from "@/lib/acoustics";
import { couldBeOne, decimalMarks, twoWaysFault, type Where } from "./separators";
import { isBlank, type ReadingUnit, readTyped, typedFault } from "./typed-number";

/** One sheet holds one instrument; the server takes as many rows at once. */
const MOST_ROWS = 128;
const MOST_PARTIAL = 64;
/** So many faults are named; the rest are counted. */
const MOST_FAULTS = 8;

export type PastedValue = { partial: number; text: string };
export type PastedRow = { line: number; midi: number; values: PastedValue[] };
export type PasteFault = { line: number | null; message: string };
export type Pasted = { rows: PastedRow[]; faults: PasteFault[]; moreFaults: number };

type Line = { line: number; fields: string[] };

/** Tabs and semicolons divide whatever else there is; then blanks, where what stands between them can be read. */
function delimiterOf(text: string): "\t" | "," | " " {
  if (/[\t;]/.test(text)) return "\t";
  if (!text.includes(",")) return " ";
  return text.split("\n").some(isReadableByBlanks) ? " " : ",";
}

function linesOf(text: string): { delimiter: "\t" | "," | " "; lines: Line[] } {
  const plain = text.replaceAll(/\r\n?/g, "\n");
  const delimiter = delimiterOf(plain);
  const { data } = Papa.parse<string[]>(
    delimiter === "\t"
      ? plain.replaceAll(";", "\t")
      : delimiter === " "
        ? plain.replaceAll(/^[^\S\n]+|[^\S\n]+$/gm, "").replaceAll(/[^\S\n]+/g, " ")
        : plain,
    { delimiter, newline: "\n", skipEmptyLines: false },
  );
  const lines = data
    .map((fields, index) => ({ line: index + 1, fields: fields.map((field) => field.trim()) }))
    .filter(({ fields }) => fields.some((field) => field !== ""))
    .map(({ line, fields }) => ({ line, fields: delimiter === "\t" ? fields.flatMap(piecesOf) : fields }));
  return { delimiter, lines };
}

/** A spreadsheet's cell with several readings in it, divided by blanks; a number with blanks between thousands is one. */
function piecesOf(field: string): string[] {
  if (!/\s/.test(field) || readTyped(field) !== null || keyOf(field) !== null) return [field];
  const pieces = field.split(/\s+/);
  return pieces.every((piece) => readTyped(piece) !== null || keyOf(piece) !== null) ? pieces : [field];
}

function isReadableByBlanks(line: string): boolean {
  const pieces = line.trim().split(/\s+/);
  return pieces.length > 1 && pieces.every((piece) => readTyped(piece) !== null || keyOf(piece) !== null);
}

/** "A0", "f#3", "E♭4", or a MIDI number. */
function keyOf(field: string): number | null {
  const named = keyFromName(field.replaceAll(/\s/g, ""));
  if (named !== null) return named;
  return /^\d{1,3}$/.test(field) ? Number(field) : null;
}

/** Words over the columns. A misspelt note with its readings is no header: its line is to be named, not skipped. */
function isHeader({ fields }: Line): boolean {
  const [first = "", ...rest] = fields;
  if (keyOf(first) !== null || readTyped(first) !== null || /^[A-Za-z]\S{0,2}\d$/.test(first)) return false;
  return rest.every((field) => readTyped(field) === null || /^\d{1,2}$/.test(field));
}

/** The partial over each column, when the header numbers them; otherwise they count from one. */
function partialsOf(header: Line | undefined, columns: number): number[] {
  const counted = Array.from({ length: columns }, (_, index) => index + 1);
  const named = header?.fields.slice(1).map((field) => /^\D{0,12}?(\d{1,2})$/.exec(field)?.[1]);
  if (!named || named.length === 0 || named.some((partial) => partial === undefined)) return counted;
  const last = Math.max(...named.map(Number));
  return [...named.map(Number), ...counted.map((index) => last + index)].slice(0, columns);
}

/**
 * Whole rows as copied from a spreadsheet: a note's name or MIDI number, then its partials; a first line of
 * words is a header. Every fault names its line, and nothing is guessed.
 */
export function readPasted(
  text: string,
  {
    unit,
    firstMidi,
    lastMidi,
    referenceHz = STANDARD_PITCH_HZ,
  }: { unit: ReadingUnit; firstMidi: number; lastMidi: number; referenceHz?: number },
): Pasted {
  const { delimiter, lines } = linesOf(text);
  const header = lines[0] && lines.length > 1 && isHeader(lines[0]) ? lines[0] : undefined;
  const body = header ? lines.slice(1) : lines;
  if (body.length === 0) {
    return { rows: [], faults: [{ line: null, message: "There are no rows in this text." }], moreFaults: 0 };
  }
  if (body.length > MOST_ROWS) {
    const message = `These are ${body.length} rows, of which ${MOST_ROWS} fit at once: one sheet holds one instrument. Nothing was entered; lines ${body[0]?.line} to ${body[MOST_ROWS - 1]?.line} would fit.`;
    return { rows: [], faults: [{ line: null, message }], moreFaults: 0 };
  }

  const partials = partialsOf(header, Math.max(...body.map(({ fields }) => fields.length - 1)));
  const faults: PasteFault[] = [];
  const twice = partials.find((partial, index) => partials.indexOf(partial) < index);
  if (header && twice !== undefined) {
    faults.push({ line: header.line, message: `Partial ${twice} heads two columns.` });
  }
  const rows: PastedRow[] = [];
  const seen = new Map<number, number>();
  const marks = decimalMarks(
    body.flatMap(({ fields }) => fields.slice(1)),
    unit,
  );
  const commasDivide = delimiter === "," && body.every(({ fields }) => couldBeDecimalCommas(fields.slice(1)));
  for (const { line, fields } of body) {
    const [first = "", ...cells] = fields;
    const midi = keyOf(first);
    const fault = (message: string) => faults.push({ line, message });
    if (midi === null) {
      fault(`“${first.slice(0, 20)}” is no note. Begin the line with a name such as A4, or a MIDI number.`);
      continue;
    }
    if (midi < firstMidi || midi > lastMidi) {
      fault(
        `${keyName(midi)} is not on this instrument, whose keys run from ${keyName(firstMidi)} to ${keyName(lastMidi)}.`,
      );
      continue;
    }
    const before = seen.get(midi);
    if (before !== undefined) fault(`${keyName(midi)} stands on line ${before} already.`);
    seen.set(midi, line);
    const values = cells.flatMap((cell, index) => {
      const partial = partials[index] ?? index + 1;
      return isBlank(cell) ? [] : [{ partial, text: cell }];
    });
    if (values.length === 0) fault(`${keyName(midi)} has no readings.`);
    if (commasDivide) {
      fault(
        `${keyName(midi)}: the commas could stand before decimals or between readings. Divide the readings by semicolons or tabs.`,
      );
    }
    for (const [index, { partial, text: typed }] of values.entries()) {
      const where: Where = { unit, midi, partial, referenceHz };
      const next = values[index + 1];
      const quoted = `${keyName(midi)}, partial ${partial}: “${typed.slice(0, 20)}”.`;
      const wrong =
        partial > MOST_PARTIAL || partial < 1
          ? "Partials run from 1 to 64."
          : (typedFault(typed, unit) ?? twoWaysFault(typed, marks, where));
      if (wrong) fault(`${quoted} ${wrong}`);
      else if (delimiter === " " && next && couldBeOne(typed, next.text, where)) {
        fault(
          `${keyName(midi)}, partial ${partial}: “${typed} ${next.text}” could be one number or two. Divide the readings by semicolons or tabs.`,
        );
      }
    }
    rows.push({ line, midi, values });
  }
  return { rows, faults: faults.slice(0, MOST_FAULTS), moreFaults: Math.max(0, faults.length - MOST_FAULTS) };
}

/** "12,1,13,5": whole numbers in pairs, all of them, of which the second of each could be decimals. */
function couldBeDecimalCommas(values: readonly string[]): boolean {
  return (
    values.length % 2 === 0 &&
    values.every((value, index) => (index % 2 === 0 ? /^[+\-\u2212\u2013]?\d+$/ : /^\d{1,3}$/).test(value))
  );
}

type CellPaste =
  | { kind: "one" }
  | { kind: "run"; texts: string[] }
  | { kind: "rows" }
  /** A number in the run can be read two ways. */
  | { kind: "unclear"; message: string };

/**
 * What was pasted into a cell: one number (the cell's own affair), a run of numbers for this cell and those
 * after it, or rows that carry their notes.
 */
export function readCellPaste(text: string, cell: Where): CellPaste {
  if (readTyped(text) !== null || isBlank(text)) return { kind: "one" };
  const { delimiter, lines } = linesOf(text);
  const isNumber = (field: string) => isBlank(field) || readTyped(field) !== null;
  const [only] = lines;
  if (lines.length === 1 && only) {
    if (only.fields.length === 1) return { kind: "one" };
    if (only.fields.every(isNumber)) {
      if (delimiter === "," && couldBeDecimalCommas(only.fields)) {
        return {
          kind: "unclear",
          message: `The commas in “${text.trim().slice(0, 40)}” could stand before decimals or between readings. Divide the readings by semicolons or tabs.`,
        };
      }
      return isRowOfKey(only.fields, cell) ? { kind: "rows" } : runOf(only.fields, cell);
    }
  }
  if (lines.every(({ fields }) => fields.length === 1 && isNumber(fields[0] ?? ""))) {
    return runOf(
      lines.map(({ fields }) => fields[0] ?? ""),
      cell,
    );
  }
  return { kind: "rows" };
}

/** "69;440,1;880,9": a MIDI number before frequencies of its key, rather than a frequency of 69 Hz. */
function isRowOfKey([first = "", second = ""]: readonly string[], { unit, referenceHz }: Where): boolean {
  const hz = readTyped(second);
  if (unit !== "hz" || !/^\d{2,3}$/.test(first) || hz === null || !(hz > 0)) return false;
  return Math.abs(centsBetween(equalTemperedHz(Number(first), referenceHz), hz)) < 200;
}

function runOf(texts: string[], cell: Where): CellPaste {
  const marks = decimalMarks(texts, cell.unit);
  for (const [index, text] of texts.entries()) {
    const fault = twoWaysFault(text, marks, { ...cell, partial: cell.partial + index });
    if (fault) return { kind: "unclear", message: `“${text.slice(0, 20)}”: ${fault}` };
  }
  return { kind: "run", texts };
}
