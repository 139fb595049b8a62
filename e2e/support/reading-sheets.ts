import { randomUUID } from "node:crypto";
import { type APIRequestContext, expect, type Locator, type Page } from "@playwright/test";
import { equalTemperedHz, keyFromName, partialHzFromF1, raiseByCents } from "../../lib/acoustics";

/** A sheet of the test's own on an instrument of the demo, so that tests side by side never meet. */
export async function newSheetOn(request: APIRequestContext, serial: string) {
  const found = await request.get("/api/v1/instruments", { params: { q: serial } });
  const { items } = (await found.json()) as { items: { id: string }[] };
  const instrumentId = items[0]?.id;
  if (!instrumentId) throw new Error(`The demo has no instrument ${serial}`);
  const made = await request.post(`/api/v1/instruments/${instrumentId}/sheets`, {
    data: {
      id: randomUUID(),
      stage: "as-found",
      takenAt: new Date().toISOString(),
      referenceHz: 440,
    },
  });
  expect(made.status(), await made.text()).toBe(201);
  const { id } = (await made.json()) as { id: string };
  return { id, instrumentId, address: `/instruments/${instrumentId}/sheets/${id}` };
}

function midiOf(name: string): number {
  const midi = keyFromName(name);
  if (midi === null) throw new Error(`There is no key ${name}`);
  return midi;
}

/** What a stiff string of this B would be read as, in hertz, its pitch so many cents from equal temperament. */
export function partialHz(name: string, partial: number, { b = 0.0004, cents = 0 } = {}): number {
  return partialHzFromF1(partial, raiseByCents(equalTemperedHz(midiOf(name), 440), cents), b);
}

/** The same as it is typed in cents from the harmonic. */
export function partialCents(name: string, partial: number, string = {}): string {
  const harmonic = partial * equalTemperedHz(midiOf(name), 440);
  return (1200 * Math.log2(partialHz(name, partial, string) / harmonic)).toFixed(1);
}

type Unit = "cents" | "hertz";

/** The sheet's table as a person finds it: by the note and the partial. */
export function sheetTable(page: Page) {
  const table = page.getByRole("table", { name: /^Readings by note and partial/ });
  return {
    table,
    cell: (note: string, partial: number, unit: Unit = "cents"): Locator =>
      table.getByRole("textbox", { name: `${spoken(note)}, partial ${partial}, ${unit}`, exact: true }),
    row: (note: string): Locator =>
      table.getByRole("row").filter({ has: page.getByRole("rowheader", { name: note, exact: true }) }),
  };
}

/** "A 4" as the cells are called aloud, from "A4". */
function spoken(note: string): string {
  return note.replace(/^([A-G])(\d)$/, "$1 $2");
}

/** Tab by Tab, as far as it takes: proves that the keyboard reaches it. */
export async function tabTo(page: Page, target: Locator, most = 120) {
  await expect(target).toBeVisible();
  for (let presses = 0; presses < most; presses++) {
    if (await target.evaluate((element) => element === document.activeElement)) return;
    await page.keyboard.press("Tab");
  }
  await expect(target).toBeFocused();
}

/** Types a run of readings, each left with Enter. */
export async function typeRun(page: Page, texts: readonly string[]) {
  for (const text of texts) {
    await page.keyboard.type(text);
    await page.keyboard.press("Enter");
  }
}
