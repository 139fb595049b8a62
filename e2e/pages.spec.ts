import { type Browser, expect, test } from "@playwright/test";
import { allPages, builtPages } from "./support/all-pages";
import { type DemoRecords, demoRecords } from "./support/demo-records";
import {
  expectAccessible,
  expectAccessibleInBothThemes,
  expectNoSidewaysScroll,
  expectTouchTargets,
  listenForFaults,
} from "./support/page-checks";
import { type DemoPerson, ownOrigin, signedInAs } from "./support/people";

const desk = { viewport: { width: 1440, height: 900 } };
const phone = { viewport: { width: 390, height: 844 }, hasTouch: true, isMobile: true };

let records: DemoRecords;

test.beforeAll(async ({ browser }) => {
  const context = await browser.newContext({ storageState: signedInAs("technician") });
  records = await demoRecords(context.request);
  await context.close();
});

async function pageFor(browser: Browser, person: DemoPerson | null, size: typeof desk | typeof phone) {
  const context = await browser.newContext({
    ...size,
    colorScheme: "light",
    ...(person ? { storageState: signedInAs(person) } : {}),
  });
  // As after a right password, when the second step is still to come.
  if (!person) await context.addCookies([{ name: "agraffe.two_factor", value: "waiting", url: ownOrigin() }]);
  return context.newPage();
}

test("every page of the build has its line among those tested here", () => {
  expect(Object.keys(allPages).sort()).toEqual(builtPages());
});

for (const [name, { as, at, endsAt }] of Object.entries(allPages)) {
  test(`${name} serves the desk: no fault, no barrier in light or dark`, async ({ browser }) => {
    const page = await pageFor(browser, as, desk);
    const faults = listenForFaults(page);
    const answer = await page.goto(at(records));
    expect(answer?.status()).toBe(200);
    expect(new URL(page.url()).pathname).toBe(endsAt ?? new URL(at(records), ownOrigin()).pathname);
    await expect(page.getByRole("heading", { level: 1 })).toHaveCount(1);
    await page.waitForLoadState("networkidle");
    await expectAccessibleInBothThemes(page, name);
    expect(faults).toEqual([]);
    await page.context().close();
  });

  test(`${name} serves the phone: whole within 390 pixels, its targets under a thumb`, async ({
    browser,
  }) => {
    const page = await pageFor(browser, as, phone);
    const faults = listenForFaults(page);
    await page.goto(at(records));
    await page.waitForLoadState("networkidle");
    await expectNoSidewaysScroll(page, name);
    await expectAccessibleInBothThemes(page, name);
    await expectTouchTargets(page, name);
    expect(faults).toEqual([]);
    await page.context().close();
  });
}

test("the staff's pages come alive under their content policy, and keep the theme chosen", async ({
  browser,
}) => {
  const page = await pageFor(browser, "technician", desk);
  const faults = listenForFaults(page);
  const answer = await page.goto("/today");
  expect(answer?.headers()["content-security-policy"]).toMatch(
    /script-src 'self' 'nonce-[^']+' 'strict-dynamic'/,
  );
  await page.getByRole("navigation", { name: "Main", exact: true }).getByRole("button").click();
  await page.getByRole("group", { name: "Paper and ink" }).getByText("Dark").click();
  await expect(page.locator("html")).toHaveAttribute("data-theme", "dark");
  await page.reload();
  await expect(page.locator("html")).toHaveAttribute("data-theme", "dark");
  expect(faults).toEqual([]);
});

test("the phone's pages come alive: More opens, and its links lead on without loading anew", async ({
  browser,
}) => {
  const page = await pageFor(browser, "technician", phone);
  await page.goto("/today");
  await page.evaluate(() => Object.assign(window, { loadedOnce: true }));
  await page.getByRole("button", { name: "More" }).tap();
  const more = page.getByRole("dialog", { name: "More" });
  await expectAccessible(page, "More");
  await more.getByRole("link", { name: "Customers" }).tap();
  await expect(page.getByRole("heading", { level: 1, name: "Customers" })).toBeVisible();
  await expect(more).toBeHidden();
  expect(await page.evaluate(() => "loadedOnce" in window)).toBe(true);
});

test("a customer's pages come alive", async ({ browser }) => {
  const page = await pageFor(browser, "customer", phone);
  await page.goto("/my");
  await page.evaluate(() => Object.assign(window, { loadedOnce: true }));
  const own = page
    .getByRole("region", { name: /^Your instruments?$/ })
    .getByRole("link")
    .first();
  const name = (await own.textContent()) ?? "";
  await own.tap();
  await expect(page.getByRole("heading", { level: 1, name })).toBeVisible();
  await expect(page.getByText(/It stood .* pitch when we/).first()).toBeVisible();
  await page.getByRole("link", { name: "Back to your instruments and visits" }).tap();
  await page.getByRole("link", { name: "Your account" }).tap();
  await expect(page).toHaveURL(/\/account$/);
  expect(await page.evaluate(() => "loadedOnce" in window)).toBe(true);
});

test("the pages before sign-in come alive", async ({ browser }) => {
  const page = await pageFor(browser, null, phone);
  await page.goto("/sign-in");
  await page.getByRole("button", { name: "Show the password" }).tap();
  await expect(page.getByLabel("Password", { exact: true })).toHaveAttribute("type", "text");
});

test("an address that is not in the book answers 404 in words, for the signed-in", async ({ browser }) => {
  const page = await pageFor(browser, "technician", phone);
  const answer = await page.goto("/nowhere/at/all");
  expect(answer?.status()).toBe(404);
  await expect(page.getByRole("heading", { name: "This page is not in the book" })).toBeVisible();
  await expectNoSidewaysScroll(page, "the page not found");
  await expectAccessibleInBothThemes(page, "the page not found");
});

test("words sent to the printer leave the controls behind", async ({ browser }) => {
  const page = await pageFor(browser, "technician", desk);
  await page.goto(`/instruments/${records.instrumentId}/stretch`);
  await expect(page.getByRole("heading", { name: "Stretch plan" })).toBeVisible();
  await page.emulateMedia({ media: "print" });
  await expect(page.getByRole("navigation", { name: "Main", exact: true })).toBeHidden();
  await expect(page.getByRole("heading", { name: "Stretch plan" })).toBeVisible();
});
