import { randomInt } from "node:crypto";
import { expect, type Page, test } from "@playwright/test";
import { signedInAs } from "./support/people";

test.use({ storageState: signedInAs("office") });

const ledger = (page: Page) => page.getByRole("table", { name: "Customers" });
const names = (page: Page) => ledger(page).getByRole("rowheader");

function newCustomer() {
  const number = randomInt(100_000, 999_999);
  return {
    name: `Zealand Quay ${number}`,
    phone: `+353 21 ${String(number).slice(0, 3)} ${String(number).slice(3)}`,
  };
}

async function addCustomer(page: Page, { name, phone }: { name: string; phone: string }) {
  await page.goto("/customers/new");
  const form = page.getByRole("form", { name: "New customer" });
  await form.getByLabel("Name").fill(name);
  await form.getByLabel("Telephone").fill(phone);
  await form.getByRole("button", { name: "Add customer" }).click();
  await expect(page.getByRole("heading", { level: 1, name })).toBeVisible();
}

test("a fault in a field is said at the field, and what was typed is still there to be sent again", async ({
  page,
}) => {
  const { name, phone } = newCustomer();
  await page.goto("/customers/new");
  const form = page.getByRole("form", { name: "New customer" });
  await form.getByLabel("Telephone").fill(phone);
  await form.getByLabel("E-mail").fill("no address");
  await form.getByRole("button", { name: "Add customer" }).click();
  const alert = form.getByRole("alert");
  await expect(alert).toContainText("2 fields need another look.");
  await expect(form.getByLabel("Name")).toBeFocused();
  await expect(form.getByLabel("Name")).toHaveAccessibleDescription("Give the customer a name.");
  await expect(form.getByLabel("E-mail")).toHaveAccessibleDescription(
    "Write an address like anna@example.org.",
  );
  await alert.getByRole("button", { name: "Give the customer a name." }).click();
  await expect(form.getByLabel("Name")).toBeFocused();
  await page.keyboard.type(name);
  await form.getByLabel("E-mail").fill("quay@example.org");
  await expect(form.getByLabel("Telephone")).toHaveValue(phone);
  await form.getByRole("button", { name: "Add customer" }).click();
  await expect(page.getByRole("heading", { level: 1, name })).toBeVisible();
  await expect(page.getByRole("link", { name: phone })).toBeVisible();
});

test("an archived customer leaves the list and comes back by Undo", async ({ page }) => {
  const customer = newCustomer();
  await addCustomer(page, customer);
  await page.getByRole("button", { name: "Archive" }).click();
  await expect(page.getByText(`${customer.name} is archived.`)).toBeVisible();
  await expect(page).toHaveURL(/\/customers$/);
  await page.getByRole("searchbox", { name: "Find a customer" }).fill(customer.name);
  await expect(page.getByText("Nothing fits these filters")).toBeVisible();
  await page.getByRole("button", { name: "Undo" }).click();
  await expect(names(page)).toHaveText([customer.name]);
  await page.reload();
  await expect(names(page)).toHaveText([customer.name]);
});

test("a customer is found by a part of the telephone number, however it is spaced", async ({ page }) => {
  const customer = newCustomer();
  await addCustomer(page, customer);
  const digits = customer.phone.replace(/\D/g, "").slice(-6);
  await page.goto("/today");
  const find = page.getByRole("dialog", { name: "Find" });
  await expect(async () => {
    await page.keyboard.press("/");
    await expect(find).toBeVisible({ timeout: 1_000 });
  }).toPass();
  await find.getByRole("combobox").fill(digits);
  await expect(find.getByRole("option")).toHaveCount(1);
  await expect(find.getByRole("option")).toContainText(customer.name);
  await page.keyboard.press("Enter");
  await expect(page.getByRole("heading", { level: 1, name: customer.name })).toBeVisible();
});

test("the list's sorting, words and filter live in its address and come back with it", async ({ page }) => {
  await page.goto("/customers");
  const before = await names(page).first().textContent();
  await ledger(page).getByRole("button", { name: "Name" }).click();
  await expect(page).toHaveURL(/[?&]sort=-name/);
  await expect(ledger(page).getByRole("columnheader", { name: "Name" })).toHaveAttribute(
    "aria-sort",
    "descending",
  );
  await expect(names(page).first()).not.toHaveText(before ?? "");
  await page.getByRole("searchbox", { name: "Find a customer" }).fill("averil");
  await expect(page).toHaveURL(/[?&]q=averil/);
  await expect(names(page)).toContainText(["Averil Conservatory"]);
  const address = page.url();
  await page.getByLabel("Show", { exact: true }).selectOption({ label: "archived" });
  await expect(page).toHaveURL(/[?&]archived=only/);
  await expect(page.getByText("Nothing fits these filters")).toBeVisible();
  await page.goto(address);
  await expect(page.getByRole("searchbox", { name: "Find a customer" })).toHaveValue("averil");
  await expect(names(page)).toContainText(["Averil Conservatory"]);
  await page.getByRole("button", { name: "Clear filters" }).click();
  await expect(page).toHaveURL(/\/customers\?sort=-name$/);
});

test("the keyboard moves through the list, chooses rows and opens one", async ({ page }) => {
  await page.goto("/customers");
  const links = names(page).getByRole("link");
  // Nothing is clicked first: the page's keys lead into its list.
  await expect(async () => {
    await page.keyboard.press("j");
    await expect(links.first()).toBeFocused({ timeout: 1_000 });
  }).toPass();
  await page.keyboard.press("j");
  await expect(links.nth(1)).toBeFocused();
  await page.keyboard.press("ArrowDown");
  await expect(links.nth(2)).toBeFocused();
  await page.keyboard.press("k");
  await page.keyboard.press("x");
  await expect(page.getByText("1 chosen")).toBeVisible();
  await page.keyboard.press("x");
  await expect(page.getByText("1 chosen")).toHaveCount(0);
  await page.keyboard.press("End");
  await expect(links.last()).toBeFocused();
  await page.keyboard.press("Home");
  const name = (await links.first().textContent()) ?? "";
  await page.keyboard.press("Enter");
  await expect(page.getByRole("heading", { level: 1, name })).toBeVisible();
});

test.describe("as a technician", () => {
  test.use({ storageState: signedInAs("technician") });

  test("customers can be read and not changed, and the page of a new one leads back to the list", async ({
    page,
  }) => {
    await page.goto("/customers");
    await expect(names(page).first()).toBeVisible();
    await expect(page.getByRole("link", { name: "New customer" })).toHaveCount(0);
    await names(page).getByRole("link").first().click();
    await expect(page.getByRole("heading", { name: "Sites and instruments" })).toBeVisible();
    await expect(page.getByRole("button", { name: "Archive" })).toHaveCount(0);
    await page.goto("/customers/new");
    await expect(page).toHaveURL(/\/customers$/);
  });
});
