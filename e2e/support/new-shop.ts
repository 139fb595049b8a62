import { expect, type Page } from "@playwright/test";
import { linkMailedTo } from "./mailbox";
import { newPerson } from "./people";

/** A shop of the test's own, opened on the page as anybody would; what it does cannot meet another test. */
export async function openNewShop(page: Page, shopName: string, ownerName = "Ida Farrow") {
  const owner = newPerson(ownerName);
  await page.goto("/sign-up");
  const form = page.getByRole("form", { name: "Open your shop’s book" });
  await form.getByLabel("Your name").fill(owner.name);
  await form.getByLabel("Mail address").fill(owner.email);
  await form.getByLabel("Password", { exact: true }).fill(owner.password);
  await form.getByLabel("Shop’s name").fill(shopName);
  await form.getByLabel("Country").selectOption("IE");
  await form.getByRole("button", { name: "Open the book" }).click();
  await expect(page.getByRole("status")).toContainText(`We have sent a mail to ${owner.email}`);
  await page.goto(await linkMailedTo(owner.email, /Confirm your address/));
  await page.getByRole("button", { name: "Confirm and go on" }).click();
  await expect(page).toHaveURL(/\/today$/);
  return owner;
}

export async function signIn(page: Page, { email, password }: { email: string; password: string }) {
  const form = page.getByRole("form", { name: "Sign in" });
  await form.getByLabel("Mail address").fill(email);
  await form.getByLabel("Password", { exact: true }).fill(password);
  await form.getByRole("button", { name: "Sign in" }).click();
}
