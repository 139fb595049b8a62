import { describe, expect, it } from "vitest";
import { readCellPaste, readPasted } from "./pasted-rows";

const piano = { unit: "cents", firstMidi: 21, lastMidi: 108 } as const;
const hz = { ...piano, unit: "hz" } as const;

describe("rows from a spreadsheet", () => {
  it("reads tabs with decimal commas, true minuses and gaps", () => {
    const { rows, faults } = readPasted("A0\t\t−12,1\t-8,3\nC#3\t+1,2\t–\t+3,4\n", piano);
    expect(faults).toEqual([]);
    expect(rows).toEqual([
      {
        line: 1,
        midi: 21,
        values: [
          { partial: 2, text: "−12,1" },
          { partial: 3, text: "-8,3" },
        ],
      },
      {
        line: 2,
        midi: 49,
        values: [
          { partial: 1, text: "+1,2" },
          { partial: 3, text: "+3,4" },
        ],
      },
    ]);
  });

  it.each([
    ["commas", "A4,440.1,880.9"],
    ["semicolons", "A4;440,1;880,9"],
    ["blanks", "A4 440.1 880.9"],
    ["quotes", '"A4","440.1","880.9"'],
    ["carriage returns", "A4,440.1,880.9\r\n"],
    ["a MIDI number", "69\t440.1\t880.9"],
    ["a MIDI number and semicolons", "69;440,1;880,9"],
    ["blanks with decimal commas", "A4 440,1 880,9"],
    ["blanks round commas", "A4, 440.1, 880.9"],
    ["tabs and blanks", "A4\t440,1 880,9"],
    ["a blank after the note, then tabs", "A4  440,1\t880,9"],
    ["semicolons and tabs", "A4;440,1\t880,9"],
  ])("reads %s", (_, text) => {
    const { rows, faults } = readPasted(text, hz);
    expect(faults).toEqual([]);
    expect(rows[0]?.midi).toBe(69);
    expect(rows[0]?.values.map(({ partial }) => partial)).toEqual([1, 2]);
  });

  it("leaves a header of words out, and follows one that numbers its partials", () => {
    const words = readPasted("Note;first;second\nA4;1;2", piano);
    expect(words.rows.map(({ line, values }) => [line, values.map(({ partial }) => partial)])).toEqual([
      [2, [1, 2]],
    ]);
    const numbered = readPasted("Note\t2\tn4\tPartial 6\nA4\t1\t2\t3", piano);
    expect(numbered.faults).toEqual([]);
    expect(numbered.rows[0]?.values.map(({ partial }) => partial)).toEqual([2, 4, 6]);
  });

  it("names the line of every fault and enters nothing by guess", () => {
    const { faults } = readPasted(
      ["H9\t1", "A4\tabc", "C2\t1\t2", "C9\t1", "A4\t1", "D4", "E4\t5000"].join("\n"),
      { ...piano, lastMidi: 105 },
    );
    expect(faults).toEqual([
      {
        line: 1,
        message: "“H9” is no note. Begin the line with a name such as A4, or a MIDI number.",
      },
      { line: 2, message: "A4, partial 1: “abc”. Not a number. Write −12.1." },
      { line: 4, message: "C9 is not on this instrument, whose keys run from A0 to A7." },
      { line: 5, message: "A4 stands on line 2 already." },
      { line: 6, message: "D4 has no readings." },
      { line: 7, message: "E4, partial 1: “5000”. Beyond two octaves: is this in Hz?" },
    ]);
  });

  it("reads flats and sharps as people write them", () => {
    const { rows } = readPasted("Bb3\t1\nE♭4\t1\nf#5\t1\nC♯6\t1", piano);
    expect(rows.map(({ midi }) => midi)).toEqual([58, 63, 78, 85]);
  });

  it("does not take a first line of readings without a note for a header", () => {
    expect(readPasted("top\t1.5\t2.5\nA4\t1", piano).faults[0]).toMatchObject({ line: 1 });
  });

  it("names a partial that heads two columns", () => {
    const { faults } = readPasted("Note\t1\t2\t2\nA4\t1\t2\t3", piano);
    expect(faults[0]).toEqual({ line: 1, message: "Partial 2 heads two columns." });
  });

  it("answers 10 000 rows at once with what would fit", () => {
    const text = Array.from({ length: 10_000 }, () => "A4\t1\t2\t3").join("\n");
    const { rows, faults } = readPasted(text, piano);
    expect(rows).toEqual([]);
    expect(faults).toHaveLength(1);
    expect(faults[0]?.message).toMatch(/10000 rows.*128 fit.*lines 1 to 128/);
  });

  it("counts faults beyond the first few instead of listing hundreds", () => {
    const text = Array.from({ length: 60 }, (_, index) => `${index + 30}\tx`).join("\n");
    const { faults, moreFaults } = readPasted(text, piano);
    expect(faults).toHaveLength(8);
    expect(moreFaults).toBe(52);
  });

  it("says that an empty text has no rows", () => {
    expect(readPasted(" \n \n", piano).faults[0]?.message).toContain("no rows");
  });
});

describe("thousands in a paste", () => {
  const faultsOf = (text: string, options: Parameters<typeof readPasted>[1] = hz) =>
    readPasted(text, options).faults;

  it("are never guessed: a number that can be read two ways is asked about with its line", () => {
    expect(faultsOf("A4;440,1\nC6;1.046;2.093")).toEqual([
      { line: 2, message: "C6, partial 1: “1.046”. This could be 1046 or 1.046. Write 1046 or 1.0460." },
      { line: 2, message: "C6, partial 2: “2.093”. This could be 2093 or 2.093. Write 2093 or 2.0930." },
    ]);
    expect(faultsOf("C6\t1.046", hz)).toHaveLength(1);
    expect(faultsOf("A4\t-1.046\t2", piano)[0]?.message).toContain("−1046 or −1.046");
    expect(faultsOf("C6\t1046\t1.046,5\t1,046.5\t1.0460", hz)).toEqual([]);
  });

  it("are no question where the other numbers, or the size, show what the mark stands for", () => {
    expect(faultsOf("A4\t440.123\t880.456", hz)).toEqual([]);
    expect(faultsOf("A0\t27.512\t55.101", hz)).toEqual([]);
    expect(faultsOf("A4\t1.046\t2.1", piano)).toEqual([]);
    expect(faultsOf("A4\t1.046\t12.345", piano)).toEqual([]);
    expect(faultsOf("A4\t1.046\t2,1", piano)).toHaveLength(1);
  });

  it("divided by blanks are one number in a cell of their key, and asked about elsewhere", () => {
    expect(readPasted("C6\t1 046,5\t2 093", hz)).toMatchObject({
      faults: [],
      rows: [{ values: [{ text: "1 046,5" }, { text: "2 093" }] }],
    });
    expect(faultsOf("F2\t88 176\t265", hz)[0]?.message).toContain("one number or several");
    expect(faultsOf("C6 1 046,5 2 093", hz)[0]).toMatchObject({
      line: 1,
      message: expect.stringContaining("“1 046,5” could be one number or two."),
    });
    expect(faultsOf("A1 55 110 165", hz)).toEqual([]);
  });

  it("do not make decimal commas of commas between readings", () => {
    expect(faultsOf("A4,12,1,13,5", piano)[0]?.message).toContain("semicolons or tabs");
    expect(faultsOf("A4,12,13,14", piano)).toEqual([]);
    expect(faultsOf("A4,12,1,13,5\nB4,1,2,3", piano)).toEqual([]);
    expect(readCellPaste("12,1,13,5", { ...cell, unit: "cents" }).kind).toBe("unclear");
  });
});

const cell = { unit: "hz", midi: 69, partial: 1, referenceHz: 440 } as const;

describe("a paste into a cell", () => {
  it.each([["784.2"], ["784,2"], ["1 046.5\n"], ["abc"], [""]])("leaves %j to the cell", (text) => {
    expect(readCellPaste(text, cell)).toEqual({ kind: "one" });
  });

  it("takes a row or a column of numbers for this cell and those after it", () => {
    expect(readCellPaste("1,5\t\t3,5", cell)).toEqual({ kind: "run", texts: ["1,5", "", "3,5"] });
    expect(readCellPaste("1.5\n2.5\n3.5\n", cell)).toEqual({ kind: "run", texts: ["1.5", "2.5", "3.5"] });
  });

  it("takes lines with notes for rows", () => {
    expect(readCellPaste("A4\t1\t2", cell)).toEqual({ kind: "rows" });
    expect(readCellPaste("A4\t1\nB4\t2", cell)).toEqual({ kind: "rows" });
    expect(readCellPaste("1\t2\n3\t4", cell)).toEqual({ kind: "rows" });
  });
  it("takes decimal commas divided by semicolons or blanks for a run", () => {
    expect(readCellPaste("440,1;880,9", cell)).toEqual({ kind: "run", texts: ["440,1", "880,9"] });
    expect(readCellPaste("440,1 880,9", cell)).toEqual({ kind: "run", texts: ["440,1", "880,9"] });
  });

  it("takes a MIDI number before frequencies of its key for a row", () => {
    expect(readCellPaste("69;440,1;880,9", cell)).toEqual({ kind: "rows" });
    expect(readCellPaste("12;440,1;880,9", cell)).toEqual({ kind: "run", texts: ["12", "440,1", "880,9"] });
  });

  it("enters nothing of a run in which a number can be read two ways", () => {
    expect(readCellPaste("1.046\t2.093", { ...cell, midi: 84 })).toMatchObject({
      kind: "unclear",
      message: expect.stringContaining("1046 or 1.046"),
    });
  });
});
