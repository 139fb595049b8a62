import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import { BandProgress, progressTicks } from "./band-progress";
import { historyLimit, historyMeasures, historyPlace, numberSide } from "./history-scale";
import { HistoryString } from "./history-string";
import { NoteName, SharpText } from "./note-name";
import { tableAsText } from "./plot-table";
import { Readout } from "./readout";
import { laneStep, OpenResidualLane, ResidualLane, UprightResidual } from "./residual-lane";

/** What a screen reader makes of markup: its text, with pictures left out. */
const spoken = (html: string) =>
  html
    .replaceAll(/<[^>]*>/g, "")
    .replaceAll(/\s+/g, " ")
    .trim();

describe("residual lanes", () => {
  const points = [
    { partial: 1, cents: -0.1 },
    { partial: 6, cents: 13.6, leftOut: true },
    { partial: 12, cents: 0.3 },
  ];

  it("say every residual and what was left out", () => {
    const html = renderToStaticMarkup(<ResidualLane points={points} />);
    expect(html).toContain("1: −0.1; 6: +13.6 left out");
  });

  it("show only the partials the sheet is turned to", () => {
    const html = renderToStaticMarkup(<ResidualLane points={points} firstPartial={11} columns={6} />);
    expect(html.match(/<circle/g)).toHaveLength(1);
    expect(html).not.toContain("13.6");
  });

  it("keep a far residual inside the lane", () => {
    const html = renderToStaticMarkup(<ResidualLane points={[{ partial: 1, cents: 900 }]} />);
    const y = Number(/cy="([\d.-]+)"/.exec(html)?.[1]);
    expect(y).toBeGreaterThanOrEqual(2.5);
  });

  it("tell a partial left out by shape and words, not by colour alone", () => {
    const html = renderToStaticMarkup(<OpenResidualLane points={points} words={{ 6: "another string?" }} />);
    expect(html).toContain("+13.6 cents, another string?");
    expect(html).toContain('stroke="var(--rust)"');
    expect(html.match(/<circle/g)).toHaveLength(1);
  });

  it("widen their scale when the used partials scatter beyond ten cents", () => {
    expect([0, 9, 14, 20, 60].map(laneStep)).toEqual([10, 10, 10, 20, 50]);
  });

  it("hold an upright residual inside its column", () => {
    const html = renderToStaticMarkup(<UprightResidual cents={-75} />);
    const x = Number(/cx="([\d.-]+)"/.exec(html)?.[1]);
    expect(x).toBeGreaterThan(4);
    expect(renderToStaticMarkup(<UprightResidual cents={null} />)).toContain("Not read");
  });
});

describe("the history on its string", () => {
  it("is scaled by the usual visit, not by one pitch raise", () => {
    expect(historyLimit([3.8, -6.4, 4.6, -7.1, 5.2, -5.8, -31])).toBe(12.5);
    expect(historyLimit([-40, -44, 3])).toBe(50);
    expect(historyLimit([])).toBe(12.5);
  });

  it("turns what lies beyond into an arrow at the edge", () => {
    expect(historyPlace(-31, 12.5, 62)).toEqual({ offset: -62, beyond: true });
    expect(historyPlace(6.25, 12.5, 62)).toEqual({ offset: 31, beyond: false });
  });

  it("sets a number on the free side of the string rather than on the date or the humidity", () => {
    for (const width of [260, 332, 600]) {
      const measures = historyMeasures(width);
      for (let offset = -measures.reach; offset <= measures.reach; offset++) {
        const side = numberSide(offset, measures);
        const along = Math.sign(offset) === side ? Math.abs(offset) + 44 : 44;
        expect(along).toBeLessThanOrEqual(side < 0 ? measures.leftRoom : measures.rightRoom);
      }
    }
  });

  it("says each visit in words", () => {
    const html = renderToStaticMarkup(
      <HistoryString
        entries={[
          {
            id: "a",
            date: "26 Nov 2025",
            work: "Tuning",
            asFoundCents: -6.4,
            asLeftCents: 0,
            humidityPercent: 37,
          },
          {
            id: "b",
            date: "1 Dec 2025",
            work: "Repair",
            asFoundCents: null,
            asLeftCents: null,
            humidityPercent: null,
          },
        ]}
      />,
    );
    expect(html).toContain("as found −6.4 cents, as left 0.0 cents");
    expect(html).toContain("pitch not read");
    expect(html).toContain("37 %");
  });
});

describe("the band against notes read", () => {
  it("labels few lines, from zero past the largest", () => {
    expect(progressTicks(4.3)).toEqual([0, 2, 4]);
    expect(progressTicks(0.9)).toEqual([0, 0.5]);
  });

  it("says where the plan stands and what is expected", () => {
    const html = renderToStaticMarkup(
      <BandProgress
        read={[
          { notes: 8, meanBandCents: 2.9 },
          { notes: 9, meanBandCents: 2.4 },
        ]}
        predicted={[{ notes: 10, meanBandCents: 1.6 }]}
      />,
    );
    expect(html).toContain("now plus or minus 2.4 cents with 9 notes; with 10 notes 1.6 cents expected");
    expect(html).toContain('stroke-dasharray="2 3"');
  });

  it("draws nothing from nothing, and one point from one", () => {
    expect(renderToStaticMarkup(<BandProgress read={[]} predicted={[]} />)).toBe("");
    const one = renderToStaticMarkup(<BandProgress read={[{ notes: 1, meanBandCents: 9 }]} predicted={[]} />);
    expect(one).not.toContain("NaN");
    expect(one).toContain("1 note<");
  });
});

describe("names and numbers beside the plots", () => {
  it("draws a sharp and says it", () => {
    const html = renderToStaticMarkup(<NoteName midi={61} />);
    expect(spoken(html)).toBe("C sharp 4");
    expect(html).toContain("<svg");
    expect(html).not.toContain("♯");
    expect(renderToStaticMarkup(<NoteName midi={88} />)).not.toContain("<svg");
  });

  it("draws sharps within a sentence and keeps the spoken words whole", () => {
    const html = renderToStaticMarkup(<SharpText text="C♯4 does not belong" />);
    expect(spoken(html)).toBe("C sharp 4 does not belong");
    expect(html).not.toContain("♯");
  });

  it("keeps the readout's columns the same for any numbers, so that nothing moves", () => {
    const columns = (value: string) =>
      /style="([^"]*)"/.exec(
        renderToStaticMarkup(
          <Readout midi={61} cells={[{ key: "b", label: "B", value, width: 144 }]} about="plain" />,
        ),
      )?.[1];
    expect(columns("1.23 ± 0.08")).toBe(columns("–"));
    expect(columns("–")).toContain("144px");
  });

  it("copies a table with notes in words and numbers a spreadsheet can add", () => {
    const text = tableAsText({
      columns: [{ key: "s", label: "Stretch, cents" }],
      rows: [{ midi: 61, cells: [{ text: "−1.4", copy: "-1.4" }] }],
    });
    expect(text).toBe("Note\tStretch, cents\nC sharp 4\t-1.4");
  });
});
