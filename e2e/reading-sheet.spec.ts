import { expect, type Page, test } from "@playwright/test";
import { signIn } from "./support/new-shop";
import { demoPassword, demoPeople, signedInAs } from "./support/people";
import { newSheetOn, partialCents, partialHz, sheetTable, tabTo, typeRun } from "./support/reading-sheets";

const osterby = "60317";

test.use({ storageState: signedInAs("technician") });

const run = (note: string, partials: readonly number[], string = {}) =>
  partials.map((partial) => partialCents(note, partial, string));

async function openNewSheet(page: Page): Promise<ReturnType<typeof sheetTable> & { id: string }> {
  const { id, address } = await newSheetOn(page.request, osterby);
  await page.goto(address);
  await comesAlive(page);
  return { id, ...sheetTable(page) };
}

/** Puts the note on the sheet and the cursor into its first cell. */
async function addNote(page: Page, note: string) {
  await page.getByRole("textbox", { name: "Add a note" }).fill(note);
  await page.getByRole("button", { name: "Add note" }).click();
  await expect(sheetTable(page).cell(note, 1)).toBeFocused();
}

/** What to read next is worked out in the browser: once it is there, the page answers to keys. */
async function comesAlive(page: Page) {
  await expect(kept(page)).toContainText("mean band");
}

const kept = (page: Page) => page.getByRole("region", { name: "What this is" });

test("a sheet is typed without a mouse, saves itself row by row and stands after a reload", async ({
  page,
}) => {
  const { cell, row } = await openNewSheet(page);
  await tabTo(page, page.getByRole("textbox", { name: "Add a note" }));
  await page.keyboard.type("A2");
  await page.keyboard.press("Enter");
  await expect(cell("A2", 1)).toBeFocused();
  await typeRun(page, run("A2", [1, 2, 3, 4, 5, 6]));
  await expect(cell("A2", 7)).toBeFocused();

  await page.keyboard.press("Shift+Enter");
  await expect(cell("A2", 6)).toBeFocused();
  await page.keyboard.press("ArrowLeft");
  await expect(cell("A2", 5)).toBeFocused();
  await page.keyboard.press("ArrowRight");
  await expect(cell("A2", 6)).toBeFocused();

  await expect(kept(page)).toContainText(/saved \d/);
  await expect(row("A2")).toContainText(/4\.0\d ± 0\.\d\d/);
  await expect(row("A2")).toContainText("good");

  await page.keyboard.press("Tab");
  const next = page.locator(":focus");
  await expect(next).not.toHaveAccessibleName(/^A 2,/);
  await expect(next).toHaveAccessibleName(/, partial 1, cents$/);
  const suggested = (await next.getAttribute("aria-label"))?.replace(/^(.+) (\d), partial.*$/, "$1$2") ?? "";
  await page.keyboard.press("Shift+Tab");
  await expect(cell("A2", 7)).toBeFocused();
  await page.keyboard.press("ArrowDown");
  await expect(page.locator(":focus")).toHaveAccessibleName(/, partial 7, cents$/);
  expect(suggested).not.toBe("");

  await page.reload();
  for (const partial of [1, 2, 3, 4, 5, 6])
    await expect(cell("A2", partial)).toHaveValue(shownCents(partialCents("A2", partial)));
  await expect(row("A2")).toContainText("good");
});

test("rows pasted from a spreadsheet are entered and saved at once, and can be taken back", async ({
  page,
  context,
}) => {
  await context.grantPermissions(["clipboard-read", "clipboard-write"]);
  const { cell, row } = await openNewSheet(page);
  await addNote(page, "A3");
  const rows = ["A3", "E4", "A4"].map((note) => [note, ...run(note, [1, 2, 3, 4, 5])].join("\t"));
  const saves: string[] = [];
  page.on("request", (request) => {
    if (request.method() === "PUT") saves.push(request.url());
  });
  await paste(page, ["Note\t1\t2\t3\t4\t5", ...rows].join("\n"));
  await expect(page.getByText("3 notes entered.")).toBeVisible();
  await expect(cell("E4", 5)).toHaveValue(shownCents(partialCents("E4", 5)));
  for (const note of ["A3", "E4", "A4"]) await expect(row(note)).toContainText(/\d ± \d/);
  await expect(kept(page)).toContainText(/saved \d/);
  // Each row goes once: those that were left together, the one in hand after its pause.
  expect(saves.map((url) => url.replace(/^.*\/(?=notes)/, ""))).toEqual(["notes", "notes/57"]);

  await cell("A3", 1).focus();
  await page.keyboard.press("Control+z");
  for (const note of ["E4", "A4"]) await expect(row(note)).toHaveCount(0);
  await expect(kept(page)).toContainText(/rows save themselves|saved \d/);
  await page.reload();
  await comesAlive(page);
  for (const note of ["A3", "E4", "A4"]) await expect(cell(note, 1)).toHaveCount(0);
});

test("pasted rows with faults are all held back, with each line's fault named and the text kept", async ({
  page,
  context,
}) => {
  await context.grantPermissions(["clipboard-read", "clipboard-write"]);
  await openNewSheet(page);
  await addNote(page, "A3");
  await paste(page, `A3\t0.1\t1.2\nH9\t1\t2\nA4\t0.0\toff\nA4\t1\t2`);
  const dialog = page.getByRole("dialog", { name: "Paste rows" });
  await expect(dialog).toContainText("Line 2. “H9” is no note.");
  await expect(dialog).toContainText("Line 3. A4, partial 2: “off”. Not a number.");
  await expect(dialog).toContainText("Line 4. A4 stands on line 3 already.");
  await dialog.getByRole("button", { name: "Close and keep the text" }).click();
  await page.getByRole("button", { name: "Paste", exact: true }).click();
  await expect(dialog.getByLabel("Rows")).toHaveValue(/H9/);

  await dialog.getByLabel("Rows").fill("");
  await dialog.getByLabel("Rows").focus();
  await paste(page, "A4\t0.1\t1.2\n".repeat(10_000));
  await expect(dialog).toContainText("These are 10000 rows, of which 128 fit at once");
  await dialog.getByRole("button", { name: "Enter rows" }).click();
  await expect(dialog).toBeVisible();
});

test("a reading off the curve stays in place with its reason, and is kept or dropped by choice", async ({
  page,
}) => {
  const { table, cell, row } = await openNewSheet(page);
  await addNote(page, "A3");
  const readings = run("A3", [1, 2, 3, 4, 5, 6, 7, 8]);
  readings[4] = String(Number(readings[4]) + 24);
  await typeRun(page, readings);
  const partial = page.getByRole("group", { name: "Partial 5" });
  await expect(table.getByText(/^Partial 5 is 2\d cents off the curve\.$/)).toBeVisible();
  await expect(partial.getByRole("radio", { name: "Drop" })).toBeChecked();
  await expect(cell("A3", 5)).toHaveValue(shownCents(readings[4]));
  await expect(row("A3").getByText("Partials used")).toHaveCount(0);
  await expect(table.getByText("7 of 8")).toBeVisible();

  await partial.getByText("Keep").click();
  await expect(table.getByText("Partial 5 is kept by hand.")).toBeVisible();
  await expect(table.getByText("8 of 8")).toBeVisible();
  await expect(kept(page)).toContainText(/saved \d/);
  await page.reload();
  await comesAlive(page);
  await cell("A3", 5).focus();
  await expect(table.getByText("Partial 5 is kept by hand.")).toBeVisible();

  await page.keyboard.press("Space");
  await expect(table.getByText("7 of 8")).toBeVisible();
  await expect(partial.getByRole("radio", { name: "Drop" })).toBeChecked();
});

test("what was typed or removed is taken back step by step, on the server too", async ({ page }) => {
  const { cell, row } = await openNewSheet(page);
  await addNote(page, "A4");
  await typeRun(page, run("A4", [1, 2, 3]));
  await expect(kept(page)).toContainText(/saved \d/);
  await page.keyboard.press("Control+z");
  await expect(cell("A4", 3)).toHaveValue("");
  await expect(cell("A4", 2)).not.toHaveValue("");
  await expect(row("A4")).toContainText("too few");
  await page.getByRole("button", { name: "Remove note" }).click();
  await expect(row("A4")).toHaveCount(0);
  await page.getByRole("button", { name: "Undo", exact: true }).click();
  await expect(cell("A4", 2)).toHaveValue(shownCents(partialCents("A4", 2)));
  await expect(kept(page)).toContainText(/saved \d/);
  await page.reload();
  await expect(cell("A4", 2)).toHaveValue(shownCents(partialCents("A4", 2)));
  await expect(cell("A4", 3)).toHaveValue("");
});

test("no number, zero and a negative frequency are named at the partial and hold the row back", async ({
  page,
}) => {
  const { table, cell, row } = await openNewSheet(page);
  await addNote(page, "A3");
  await typeRun(page, run("A3", [1, 2]));
  await page.getByRole("group", { name: "Show readings in" }).getByText("Hz").click();
  await cell("A3", 3, "hertz").focus();
  await typeRun(page, ["abc", "0", "-440"]);
  await expect(table.getByText("Not a number. Write 784.2. Not saved yet.")).toBeVisible();
  await expect(table.getByText("A frequency is above zero. Not saved yet.")).toHaveCount(2);
  await expect(row("A3")).toContainText("not saved");
  for (const partial of [3, 4, 5])
    await expect(cell("A3", partial, "hertz")).toHaveAttribute("aria-invalid", "true");

  await page.reload();
  await comesAlive(page);
  await expect(page.getByText("One note was not saved yet.")).toBeVisible();
  await page.getByRole("group", { name: "Show readings in" }).getByText("Hz").click();
  await expect(cell("A3", 3, "hertz")).toHaveValue("abc");
  await cell("A3", 3, "hertz").focus();
  await typeRun(
    page,
    [3, 4, 5].map((partial) => partialHz("A3", partial).toFixed(2)),
  );
  await expect(row("A3")).toContainText(/usable|good/);
  await expect(kept(page)).toContainText(/saved \d/);
});

test("a far frequency is asked about, never dropped, and saved once it is confirmed", async ({ page }) => {
  const { table, cell, row } = await openNewSheet(page);
  await addNote(page, "A3");
  await typeRun(page, run("A3", [1, 2, 3, 4]));
  const far = (Number(partialCents("A3", 5)) + 330).toFixed(1);
  await typeRun(page, [far]);
  await expect(table.getByText(/^Partial 5 is 3\d\d cents above where it is expected$/)).toBeVisible();
  await expect(row("A3")).toContainText("asks");
  await expect(cell("A3", 5)).toHaveAttribute("aria-invalid", "true");
  await expect(kept(page)).toContainText("1 note not saved yet");

  await page.getByRole("button", { name: "It is as typed" }).click();
  await expect(kept(page)).toContainText(/saved \d/);
  await page.reload();
  await comesAlive(page);
  await expect(cell("A3", 5)).toHaveValue(shownCents(far));
  await cell("A3", 5).focus();
  await expect(table.getByText(/^Partial 5 is \d+ cents off the curve\.$/)).toBeVisible();
});

test("without network what is typed stays, through a reload too, and is saved when the network is back", async ({
  page,
  context,
}) => {
  const { table, cell, row } = await openNewSheet(page);
  await addNote(page, "A4");
  await context.setOffline(true);
  await typeRun(page, run("A4", [1, 2, 3, 4]));
  await expect(table.getByText(/^Not saved: the server does not answer\. Trying again/)).toBeVisible();
  await expect(kept(page)).toContainText("1 note not saved");
  await expect(cell("A4", 4)).toHaveValue(partialCents("A4", 4));
  await context.setOffline(false);
  await expect(row("A4")).toContainText(/usable|good/);
  await expect(kept(page)).toContainText(/saved \d/);

  await page.route("**/api/v1/sheets/*/notes**", (route) => route.abort("connectionfailed"));
  await addNote(page, "E5");
  await typeRun(page, run("E5", [1, 2, 3]));
  await expect(kept(page)).toContainText("1 note not saved");
  await page.reload();
  await comesAlive(page);
  await expect(page.getByText("One note was not saved yet.")).toBeVisible();
  await expect(cell("E5", 3)).toHaveValue(partialCents("E5", 3));
  await page.unroute("**/api/v1/sheets/*/notes**");
  await page.getByRole("button", { name: /^Save 1 note again$/ }).click();
  await expect(kept(page)).toContainText(/saved \d/);
  await page.reload();
  await expect(cell("E5", 3)).toHaveValue(shownCents(partialCents("E5", 3)));
});

test("a reload while a save is on its way, and a change right after it, is no clash with oneself", async ({
  page,
}) => {
  const { id, table, cell, row } = await openNewSheet(page);
  await addNote(page, "A4");
  // The server takes what it is sent, but its answer never reaches the page.
  const silent = "**/api/v1/sheets/*/notes/**";
  await page.route(silent, async (route) => {
    await route.fetch();
  });
  await typeRun(page, run("A4", [1, 2, 3]));
  const stored = async (): Promise<number> => {
    const { notes } = await (await page.request.get(`/api/v1/sheets/${id}`)).json();
    return notes[0]?.readings.length ?? 0;
  };
  await expect.poll(stored).toBeGreaterThan(0);
  await typeRun(page, run("A4", [4]));
  await page.unrouteAll({ behavior: "ignoreErrors" });
  await page.reload();
  await comesAlive(page);
  await cell("A4", 5).focus();
  await typeRun(page, run("A4", [5]));
  await expect.poll(stored).toBe(5);
  await expect(table.getByText("somebody else")).toHaveCount(0);
  await expect(row("A4")).toContainText(/usable|good/);
});

test("a note somebody else changed meanwhile shows both versions, and neither is lost before one is chosen", async ({
  page,
  browser,
}) => {
  const { table, cell, row } = await openNewSheet(page);
  await addNote(page, "A4");
  await typeRun(page, run("A4", [1, 2, 3]));
  await expect(kept(page)).toContainText(/saved \d/);

  const other = await (await browser.newContext({ storageState: signedInAs("technician") })).newPage();
  await other.goto(page.url());
  await comesAlive(other);
  const theirs = sheetTable(other);
  await theirs.cell("A4", 2).focus();
  await other.keyboard.type("4.4");
  await other.keyboard.press("Enter");
  await expect(kept(other)).toContainText(/saved \d/);

  await cell("A4", 2).focus();
  await page.keyboard.type("5.5");
  await page.keyboard.press("Enter");
  await expect(table.getByText("Not saved: somebody else changed this note meanwhile.")).toBeVisible();
  await table.getByText("See both").click();
  const both = page
    .getByRole("row", { name: "2 +5.5 +4.4" })
    .or(page.getByRole("row", { name: "2 5.5 +4.4" }));
  await expect(both).toBeVisible();
  await page.getByRole("button", { name: "Keep mine" }).click();
  await expect(table.getByText("somebody else changed")).toHaveCount(0);
  await expect(row("A4")).not.toContainText("changed");
  await expect(kept(page)).toContainText(/saved \d/);
  await other.reload();
  await expect(theirs.cell("A4", 2)).toHaveValue("+5.5");
});

test("a save after being signed out loses nothing, and goes through after signing in beside it", async ({
  page,
  context,
}) => {
  const { table, cell, row } = await openNewSheet(page);
  await addNote(page, "A4");
  await context.clearCookies();
  await typeRun(page, run("A4", [1, 2, 3, 4]));
  await expect(table.getByText("Not saved: you are signed out. What you typed is still here.")).toBeVisible();
  await expect(cell("A4", 4)).toHaveValue(partialCents("A4", 4));

  const popup = page.waitForEvent("popup");
  await page.getByRole("link", { name: "Sign in in a new tab" }).click();
  const beside = await popup;
  await signIn(beside, { email: demoPeople.technician, password: demoPassword });
  await expect(beside).toHaveURL(/\/today$/);
  await beside.close();
  await page.getByRole("button", { name: "Save again", exact: true }).click();
  await expect(row("A4")).toContainText(/usable|good/);
  await expect(kept(page)).toContainText(/saved \d/);
  await page.reload();
  await expect(cell("A4", 4)).toHaveValue(shownCents(partialCents("A4", 4)));
});

/** As a cell at rest shows a number of cents: signed, with a true minus. */
function shownCents(typed: string | undefined): string {
  const value = Number(typed);
  return value > 0 ? `+${value.toFixed(1)}` : value.toFixed(1).replace("-", "−");
}

async function paste(page: Page, text: string) {
  await page.evaluate((words) => navigator.clipboard.writeText(words), text);
  await page.keyboard.press("Control+v");
}
