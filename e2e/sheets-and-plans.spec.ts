import { expect, type Page, test } from "@playwright/test";
import { demoRecords } from "./support/demo-records";
import { signedInAs } from "./support/people";
import { newSheetOn, partialHz } from "./support/reading-sheets";

test.use({ storageState: signedInAs("technician") });

const about = (page: Page) => page.getByRole("region", { name: "What this is" });
const circumstances = (page: Page) => page.getByRole("form", { name: "Circumstances of the sheet" });

test.describe("a sheet's circumstances", () => {
  test("are put right from the sheet, and show on it", async ({ page }) => {
    const { address } = await newSheetOn(page.request, "60317");
    await page.goto(address);
    await about(page).getByRole("link", { name: "Change the circumstances" }).click();
    const form = circumstances(page);
    await form.getByLabel("Humidity").fill("47,5");
    await form.getByText("As left").click();
    await form.getByLabel("Remarks").fill("Lid off, window shut.");
    await form.getByRole("button", { name: "Save sheet" }).click();
    await expect(page).toHaveURL(new RegExp(`${address}$`));
    await expect(about(page)).toContainText("47.5 % humidity");
    await expect(about(page)).toContainText("Lid off, window shut.");
    await expect(about(page).getByRole("heading", { name: "As left" })).toBeVisible();
  });

  test("changed by two people at once show both versions before one is chosen", async ({ page }) => {
    const { id, address } = await newSheetOn(page.request, "60317");
    await page.goto(`${address}/edit`);
    const form = circumstances(page);
    await form.getByLabel("Temperature").fill("18");
    const other = await page.request.patch(`/api/v1/sheets/${id}`, {
      data: { version: 1, humidityPercent: 62 },
    });
    expect(other.status()).toBe(200);
    await form.getByRole("button", { name: "Save sheet" }).click();
    const both = page.getByRole("region", { name: "Two versions" });
    await expect(both.getByRole("row", { name: "Humidity 62 % empty" })).toBeVisible();
    await both.getByRole("button", { name: "Take the saved one" }).click();
    await form.getByLabel("Temperature").fill("18");
    await form.getByRole("button", { name: "Save sheet" }).click();
    await expect(about(page)).toContainText("62 % humidity, 18 °C");
  });

  test("say what a new reference pitch does to what was read, and do it", async ({ page }) => {
    const { id, address } = await newSheetOn(page.request, "60317");
    const readings = [1, 2, 3].map((partial) => ({ partial, hz: partialHz("A4", partial) }));
    await page.request.put(`/api/v1/sheets/${id}/notes/69`, { data: { readings } });
    await page.goto(`${address}/edit`);
    const form = circumstances(page);
    await form.getByLabel("Reference pitch, A4").fill("442");
    await expect(form).toContainText("The frequencies stay as they were read");
    await form.getByRole("radio", { name: "Cents" }).check({ force: true });
    await expect(form).toContainText("their frequencies move with it");
    await form.getByRole("button", { name: "Save sheet" }).click();
    await expect(about(page)).toContainText("A4 = 442 Hz");
    const sheet = await (await page.request.get(`/api/v1/sheets/${id}`)).json();
    expect(sheet.notes[0].readings[0].hz).toBeCloseTo((partialHz("A4", 1) * 442) / 440, 6);
  });
});

test.describe("a stretch plan's address", () => {
  test("carries what is chosen, step by step for Back, and can be opened by itself", async ({ page }) => {
    const { instrumentId } = await demoRecords(page.request);
    const at = `/instruments/${instrumentId}/stretch`;
    await page.goto(at);
    const style = page.getByLabel("Style", { exact: true });
    const pitch = page.getByLabel("A4", { exact: true });
    const usual = await style.inputValue();
    await style.selectOption({ label: "Wide" });
    await expect(page).toHaveURL(/\?style=wide$/);
    await pitch.fill("442.5");
    await expect(page).toHaveURL(/style=wide&referenceHz=442\.5$/);
    await expect(page.getByText(/^Wide, equal temperament/)).toBeVisible();

    await page.goBack();
    await expect(page).toHaveURL(/\?style=wide$/);
    await expect(pitch).toHaveValue("440");
    await page.goBack();
    await expect(style).toHaveValue(usual);
    await expect(page.getByText(/^Wide, equal temperament/)).toHaveCount(0);

    await page.goto(`${at}?style=close&temperament=vallotti&referenceHz=415`);
    await expect(page.getByText(/^Close, Vallotti temperament/)).toBeVisible();
    await expect(pitch).toHaveValue("415");
  });

  test("that asks for what there is not falls back with a word", async ({ page }) => {
    const { instrumentId } = await demoRecords(page.request);
    await page.goto(`/instruments/${instrumentId}/stretch?style=nobody&temperament=odd&referenceHz=9000`);
    await expect(page.getByText("The address names a style that this shop does not have.")).toBeVisible();
    await expect(page.getByText("The address names a temperament that is not known.")).toBeVisible();
    await expect(page.getByText("The address names a pitch of A4 that is not")).toBeVisible();
    await expect(page.getByLabel("A4", { exact: true })).toHaveValue("440");
  });

  test("leaves a note that does not belong to the keyboard's curve, and says so", async ({ page }) => {
    const { instrumentId } = await demoRecords(page.request);
    await page.goto(`/instruments/${instrumentId}/stretch`);
    await expect(page.getByRole("list", { name: "Notes that do not belong" })).toContainText("E6");
    await expect(page.getByText("Plan and beats follow the curve of the keyboard there")).toBeVisible();
    await expect(page.getByText(/Major thirds rise (un)?evenly from C3 to F4/)).toBeVisible();
  });
});

test("the numbers of a plan are copied by a thumb", async ({ page }) => {
  await page.setViewportSize({ width: 820, height: 1180 });
  const { instrumentId } = await demoRecords(page.request);
  await page.goto(`/instruments/${instrumentId}/stretch`);
  const box = await page.getByRole("button", { name: "Copy" }).boundingBox();
  expect(box?.height).toBeGreaterThanOrEqual(44);
  expect(box?.width).toBeGreaterThanOrEqual(44);
});

for (const [width, height] of [
  [820, 1180],
  [700, 900],
] as const) {
  test(`what is said of the open note stands above the bar at ${width} pixels`, async ({ page }) => {
    await page.setViewportSize({ width, height });
    const { instrumentId, sheetId } = await demoRecords(page.request);
    await page.goto(`/instruments/${instrumentId}/sheets/${sheetId}?note=88`);
    const words = page.getByRole("button", { name: "Remove note" });
    await expect(words).toBeVisible();
    await expect(async () => {
      const [panel, bar] = [
        await words.boundingBox(),
        await page.locator("[data-bottom-bar]").first().boundingBox(),
      ];
      expect(panel?.y ?? 0).toBeGreaterThan(0);
      expect((panel?.y ?? 0) + (panel?.height ?? 0)).toBeLessThanOrEqual(bar?.y ?? 0);
    }).toPass();
    const row = page
      .getByRole("row")
      .filter({ has: page.getByRole("rowheader", { name: "E6", exact: true }) });
    // Where the row has no room they stand on a line of their own.
    if (width === 820) await expect(row).toContainText(/\d ± \d.*good/);
  });
}
