import { expect, test } from "@playwright/test";
import { openNewShop } from "./support/new-shop";
import { partialCents, sheetTable, typeRun } from "./support/reading-sheets";

/** Invented strings of one piano, of the size that stiff strings have; a few cents of pitch as real ones have. */
const strings = [
  { note: "A1", b: 0.00024, cents: -6 },
  { note: "A2", b: 0.00019, cents: -2 },
  { note: "A3", b: 0.0003, cents: 0 },
  { note: "A4", b: 0.0007, cents: 1 },
  { note: "A5", b: 0.002, cents: 4 },
  { note: "A6", b: 0.006, cents: 12 },
];

test("a new shop gets from its first sign-up to a kept stretch plan", async ({ page }) => {
  test.slow();
  await openNewShop(page, "Averil Strings", "Noor Vance");

  const main = page.getByRole("navigation", { name: "Main", exact: true });
  await main.getByRole("link", { name: "Today" }).click();
  await expect(page.getByRole("link", { name: "Book a visit" })).toHaveCount(0);
  await page.getByRole("link", { name: "Add your first customer" }).click();
  const customer = page.getByRole("form", { name: "New customer" });
  await customer.getByLabel("Name").fill("Chapel on the Dunes");
  await customer.getByLabel("Telephone").fill("+353 20 910 4471");
  await customer.getByRole("button", { name: "Add customer" }).click();
  await expect(page.getByRole("heading", { level: 1, name: "Chapel on the Dunes" })).toBeVisible();

  await page.getByRole("link", { name: "Add a site" }).click();
  const site = page.getByRole("form", { name: "New site" });
  await expect(site.getByRole("combobox", { name: "Customer" })).toHaveValue("Chapel on the Dunes");
  await site.getByLabel("Name").fill("Chapel");
  await site.getByLabel("Street").fill("4 Marram Lane");
  await site.getByLabel("Town").fill("Port Averil");
  await site.getByRole("button", { name: "Add site" }).click();
  await expect(page.getByRole("heading", { level: 1, name: "Chapel" })).toBeVisible();
  await expect(main.getByRole("link", { name: "Customers" })).toHaveAttribute("aria-current", "page");

  await page.getByRole("link", { name: "Add an instrument" }).click();
  const instrument = page.getByRole("form", { name: "New instrument" });
  await instrument.getByLabel("Maker").fill("Brightwater");
  await instrument.getByLabel("Model").fill("170");
  await instrument.getByLabel("Serial number").fill("90125");
  await instrument.getByLabel("Break").selectOption({ label: "F2" });
  await instrument.getByRole("button", { name: "Add instrument" }).click();
  await expect(page.getByRole("heading", { level: 1, name: "Brightwater 170" })).toBeVisible();

  const tabs = page.getByRole("navigation", { name: "Brightwater 170" });
  await tabs.getByRole("link", { name: "Inharmonicity" }).click();
  await expect(page.getByText("No readings yet")).toBeVisible();
  await page.getByRole("link", { name: "New reading sheet" }).click();
  const circumstances = page.getByRole("form", { name: "New reading sheet" });
  await circumstances.getByLabel("Humidity").fill("47");
  await circumstances.getByRole("button", { name: "Begin sheet" }).click();
  const about = page.getByRole("region", { name: "What this is" });
  await expect(about).toContainText("mean band");

  const { cell, row } = sheetTable(page);
  const addNote = page.getByRole("textbox", { name: "Add a note" });
  for (const { note, ...string } of strings) {
    await addNote.focus();
    await page.keyboard.type(note);
    await page.keyboard.press("Enter");
    await expect(cell(note, 1)).toBeFocused();
    await typeRun(
      page,
      [1, 2, 3, 4, 5, 6].map((partial) => partialCents(note, partial, string)),
    );
    await expect(row(note)).toContainText(/\d ± \d/);
    await expect(row(note)).toContainText(/good|usable/);
  }
  await expect(about).toContainText(/saved \d/);
  await expect(about).toContainText("6 of 88");

  await tabs.getByRole("link", { name: "Inharmonicity" }).click();
  await expect(page.getByRole("heading", { name: "Inharmonicity and stretch" })).toBeVisible();
  await expect(page.getByText("6 notes fitted", { exact: false })).toBeVisible();
  await page.getByRole("button", { name: "Numbers" }).click();
  const measured = page.getByRole("region", { name: /numbers$/ }).first();
  await expect(measured.getByRole("row", { name: /^A4 / })).toContainText(/7\.0\d.*measured/);

  await tabs.getByRole("link", { name: "Stretch plan" }).click();
  await expect(page.getByRole("heading", { name: "Stretch plan" })).toBeVisible();
  await expect(page.getByLabel("Style")).not.toHaveValue("");
  const targets = page.getByRole("region", { name: "Targets: numbers" });
  await expect(targets.getByRole("row")).toHaveCount(89);
  await expect(targets.getByRole("columnheader", { name: "± 95 %" })).toBeVisible();
  await expect(targets.getByRole("row", { name: /^A4 / })).toContainText(/0\.0 ?0?\.?\d* ?440\.0/);
  await expect(page.getByText("None yet. A saved plan stays as it is")).toBeVisible();
  await page.getByRole("button", { name: "Save plan" }).first().click();
  await expect(page.getByText("Plan saved.")).toBeVisible();
  const kept = page.getByRole("region", { name: "Kept plans" }).getByRole("listitem");
  await expect(kept).toHaveCount(1);
  await expect(kept).toContainText("A4 440 Hz");
  await expect(kept).toContainText("Noor Vance");
  const csv = await page.request.get(
    (await kept.getByRole("link", { name: "CSV" }).getAttribute("href")) ?? "",
  );
  expect(csv.status()).toBe(200);
  expect((await csv.text()).trim().split("\n")).toHaveLength(89);
});
