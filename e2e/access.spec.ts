import { type Browser, expect, type Page, test } from "@playwright/test";
import { type DemoRecords, demoRecords } from "./support/demo-records";
import { signIn } from "./support/new-shop";
import { type DemoPerson, demoPassword, demoPeople, ownOrigin, signedInAs } from "./support/people";
import { newSheetOn, sheetTable } from "./support/reading-sheets";

let records: DemoRecords;

test.beforeAll(async ({ browser }) => {
  const { request } = await as(browser, "technician");
  records = await demoRecords(request);
});

async function as(browser: Browser, person: DemoPerson): Promise<Page> {
  return (await browser.newContext({ storageState: signedInAs(person) })).newPage();
}

function staffPages({ instrumentId, siteId, customerId, sheetId, visitId, styleId }: DemoRecords) {
  const instrument = `/instruments/${instrumentId}`;
  return [
    instrument,
    `${instrument}/stretch`,
    `${instrument}/sheets`,
    `${instrument}/sheets/new`,
    `${instrument}/sheets/${sheetId}`,
    `${instrument}/compare`,
    `${instrument}/record`,
    `${instrument}/visits`,
    `/sites/${siteId}`,
    `/sites/${siteId}/edit`,
    `/customers/${customerId}`,
    `/customers/${customerId}/edit`,
    `/visits/${visitId}`,
    `/visits/${visitId}/change`,
    `/shop/styles/${styleId}`,
  ];
}

test("another shop's records are not there: 404 and the same page as for an address that never was", async ({
  browser,
}) => {
  test.slow();
  const stranger = await as(browser, "stranger");
  const none = "0198d5a4-0000-7000-8000-000000000000";
  for (const address of [...staffPages(records), `/instruments/${none}`, "/instruments/not-an-id"]) {
    const answer = await stranger.goto(address);
    expect(answer?.status(), address).toBe(404);
    await expect(stranger.getByRole("heading", { name: "This page is not in the book" })).toBeVisible();
  }
  const { instrumentId, siteId, customerId, sheetId, visitId } = records;
  for (const address of [
    `/instruments/${instrumentId}`,
    `/instruments/${instrumentId}/sheets`,
    `/sites/${siteId}`,
    `/customers/${customerId}`,
    `/visits/${visitId}`,
    `/sheets/${sheetId}`,
    `/sheets/${sheetId}/analysis`,
    `/sheets/${sheetId}/export?format=csv`,
  ]) {
    const answer = await stranger.request.get(`/api/v1${address}`);
    expect(answer.status(), address).toBe(404);
    expect(answer.headers()["content-type"]).toContain("application/problem+json");
  }
  const written = await stranger.request.put(`/api/v1/sheets/${sheetId}/notes/69`, {
    data: { readings: [{ partial: 1, hz: 440 }] },
    headers: { origin: ownOrigin() },
  });
  expect(written.status()).toBe(404);
  const found = await stranger.request.get("/api/v1/search", { params: { q: "48213" } });
  const { items } = (await found.json()) as { items: { id: string }[] };
  expect(items.filter(({ id }) => id === instrumentId)).toEqual([]);
});

test("a customer's sign-in is kept on its own pages and sees nothing of the others", async ({ browser }) => {
  test.slow();
  const customer = await as(browser, "customer");
  for (const address of ["/", "/today", "/customers", "/shop/team", "/find", ...staffPages(records)]) {
    const answer = await customer.goto(address);
    const kept = new URL(customer.url()).pathname.startsWith("/my") || answer?.status() === 404;
    expect(kept, `${address} answered ${answer?.status()} at ${customer.url()}`).toBe(true);
  }
  await customer.goto("/my");
  await expect(customer.getByRole("heading", { name: "Your instruments and visits" })).toBeVisible();
  await expect(customer.getByText("Averil Conservatory")).toHaveCount(0);

  const { instrumentId, customerId, visitId, sheetId } = records;
  const answers = {
    [`/instruments/${instrumentId}`]: 404,
    [`/customers/${customerId}`]: 404,
    [`/visits/${visitId}`]: 404,
    [`/sheets/${sheetId}`]: 403,
    "/search?q=castellan": 403,
    "/members": 403,
    "/styles": 403,
  };
  for (const [address, status] of Object.entries(answers)) {
    const answer = await customer.request.get(`/api/v1${address}`);
    expect(answer.status(), address).toBe(status);
  }
  const listed = await customer.request.get("/api/v1/customers");
  expect(((await listed.json()) as { items: unknown[] }).items).toHaveLength(1);
});

test("the office reads a sheet and cannot write on it, on the page or past it", async ({ browser }) => {
  const technician = await as(browser, "technician");
  const sheet = await newSheetOn(technician.request, "48213");
  const note = { data: { readings: [{ partial: 1, hz: 440.2 }] }, headers: { origin: ownOrigin() } };
  const written = await technician.request.put(`/api/v1/sheets/${sheet.id}/notes/69`, note);
  expect(written.status()).toBe(200);

  const office = await as(browser, "office");
  await office.goto(sheet.address);
  const why = "Readings are written by the technicians of the visit and the owner";
  await expect(office.getByRole("paragraph").filter({ hasText: why })).toBeVisible();
  const { cell } = sheetTable(office);
  await expect(cell("A4", 1)).toHaveAttribute("readonly", "");
  await expect(cell("A4", 1)).toHaveValue("+0.8");
  await cell("A4", 1).focus();
  await office.keyboard.type("5");
  await expect(cell("A4", 1)).toHaveValue(/^\+0\.(8|79|787)$/);
  for (const name of ["Paste", "Add note", "Undo", "Remove note"])
    await expect(office.getByRole("button", { name, exact: true })).toHaveCount(0);
  const refused = await office.request.put(`/api/v1/sheets/${sheet.id}/notes/69`, note);
  expect(refused.status()).toBe(403);
});

test("a signed-out reader is asked to sign in and comes back to the page asked for", async ({ page }) => {
  const asked = `/instruments/${records.instrumentId}/stretch?sheet=${records.sheetId}`;
  await page.goto(asked);
  await expect(page).toHaveURL(/\/sign-in\?next=/);
  await signIn(page, { email: demoPeople.technician, password: demoPassword });
  await expect(page).toHaveURL(asked);
  await expect(page.getByRole("heading", { name: "Stretch plan" })).toBeVisible();
});

test("a session that has ended leads to sign-in and back, and the API answers 401", async ({ browser }) => {
  const page = await as(browser, "technician");
  await page.context().clearCookies();
  await page
    .context()
    .addCookies([{ name: "agraffe.session_token", value: "ended.0", url: ownOrigin(), httpOnly: true }]);
  await page.goto("/visits");
  await expect(page).toHaveURL(/\/sign-in\?next=%2Fvisits$/);
  const answer = await page.request.get("/api/v1/customers");
  expect(answer.status()).toBe(401);
});

test("the way back after sign-in never leads to another site", async ({ page }) => {
  await page.goto(`/sign-in?next=${encodeURIComponent("//elsewhere.example/today")}`);
  await signIn(page, { email: demoPeople.technician, password: demoPassword });
  await expect(page).toHaveURL(/\/today$/);
  expect(new URL(page.url()).origin).toBe(ownOrigin());
});
