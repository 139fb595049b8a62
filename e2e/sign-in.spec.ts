import { type Browser, expect, type Page, test } from "@playwright/test";
import { fromBase32, totp } from "../tests/support/totp";
import { linkMailedTo } from "./support/mailbox";
import { openNewShop, signIn } from "./support/new-shop";
import { demoPeople, newPerson } from "./support/people";

const doNotGoTogether = "The address and the password do not go together.";

async function otherDevice(browser: Browser): Promise<Page> {
  return (await browser.newContext()).newPage();
}

test("a wrong password and an unknown address are told in the same words, and the address stays", async ({
  page,
}) => {
  const form = page.getByRole("form", { name: "Sign in" });
  for (const email of ["tech@larchandwren.example", newPerson("Nobody Known").email]) {
    await page.goto("/sign-in");
    await signIn(page, { email, password: "not the password of anybody" });
    await expect(form.getByRole("alert")).toContainText(doNotGoTogether);
    await expect(form.getByRole("alert")).toBeFocused();
    await expect(form.getByLabel("Mail address")).toHaveValue(email);
  }
});

test("fields left empty are named at their place before anything is sent", async ({ page }) => {
  await page.goto("/sign-in");
  const form = page.getByRole("form", { name: "Sign in" });
  await form.getByRole("button", { name: "Sign in" }).click();
  await expect(form.getByLabel("Mail address")).toHaveAttribute("aria-invalid", "true");
  await expect(form.getByLabel("Password", { exact: true })).toHaveAttribute("aria-invalid", "true");
  await form.getByRole("alert").getByRole("button").first().click();
  await expect(form.getByLabel("Mail address")).toBeFocused();
});

test("a forgotten password is set anew by a mailed link that works once and ends every sign-in", async ({
  page,
  browser,
}) => {
  const lost = await otherDevice(browser);
  const person = await openNewShop(lost, "Reddle Pianos", "Wilma Reddle");
  await page.goto("/sign-in");
  await page.getByRole("link", { name: "Forgotten?" }).click();
  const ask = page.getByRole("form", { name: "Forgotten password" });
  await ask.getByLabel("Mail address").fill(person.email);
  await page.getByRole("button", { name: "Send the link" }).click();
  await expect(page.getByRole("status")).toContainText(`If ${person.email} has a sign-in here`);

  const link = await linkMailedTo(person.email, /new password/);
  await page.goto(link);
  const form = page.getByRole("form", { name: "Set a new password" });
  await form.getByLabel("New password").fill("too short");
  await form.getByRole("button", { name: "Set the password" }).click();
  await expect(form.getByRole("alert")).toContainText("at least 15 characters");
  const password = "an estuary of slow grey geese";
  await form.getByLabel("New password").fill(password);
  await form.getByRole("button", { name: "Set the password" }).click();
  await expect(page.getByRole("status")).toContainText("The new password is set");

  await lost.goto("/today");
  await expect(lost).toHaveURL(/\/sign-in/);
  await signIn(page, person);
  await expect(page.getByRole("form").getByRole("alert")).toContainText(doNotGoTogether);
  await signIn(page, { email: person.email, password });
  await expect(page).toHaveURL(/\/today$/);

  await page.goto(link);
  await expect(page.getByRole("alert").filter({ hasText: "has been used or has expired" })).toBeVisible();
  await page.getByRole("link", { name: "Ask for a new link" }).click();
  await expect(page.getByRole("form", { name: "Forgotten password" })).toBeVisible();
});

test("an address nobody signs in with gets the same answer, and no mail", async ({ page }) => {
  const { email } = newPerson("Nobody Either");
  await page.goto("/forgot-password");
  await page.getByLabel("Mail address").fill(email);
  await page.getByRole("button", { name: "Send the link" }).click();
  await expect(page.getByRole("status")).toContainText(`If ${email} has a sign-in here`);
});

test("a sign-up waits for its mailed link, which asks another browser for the password", async ({
  page,
  browser,
}) => {
  const owner = newPerson("Juno Marsh");
  await page.goto("/sign-up");
  const form = page.getByRole("form", { name: "Open your shop’s book" });
  await form.getByLabel("Your name").fill(owner.name);
  await form.getByLabel("Mail address").fill(owner.email);
  await form.getByLabel("Password", { exact: true }).fill(owner.password);
  await form.getByLabel("Shop’s name").fill("Marsh Pianos");
  await form.getByRole("button", { name: "Open the book" }).click();
  await expect(page.getByRole("status")).toContainText(`We have sent a mail to ${owner.email}`);
  await expect(page.getByRole("link", { name: "Open the local mailbox" })).toBeVisible();

  await page.goto("/sign-in");
  await signIn(page, owner);
  await expect(page.getByRole("form", { name: "Sign in" }).getByRole("alert")).toContainText(
    "not confirmed yet",
  );
  await expect(page.getByRole("button", { name: "Send the mail again" })).toBeVisible();

  const phone = await otherDevice(browser);
  await phone.goto(await linkMailedTo(owner.email, /Confirm your address/));
  const confirm = phone.getByRole("form", { name: "Confirm your address" });
  await confirm.getByRole("button", { name: "Confirm and go on" }).click();
  await expect(confirm.getByRole("alert")).toContainText("Type the password you chose");
  await confirm.getByLabel("Password", { exact: true }).fill(owner.password);
  await confirm.getByRole("button", { name: "Confirm and go on" }).click();
  await expect(phone).toHaveURL(/\/today$/);
  await expect(phone.getByText("Marsh Pianos").first()).toBeVisible();
});

test("an address that signs in already is told in a mail only", async ({ page }) => {
  const known = demoPeople.stranger;
  await page.goto("/sign-up");
  const form = page.getByRole("form", { name: "Open your shop’s book" });
  await form.getByLabel("Your name").fill("Somebody Else");
  await form.getByLabel("Mail address").fill(known);
  await form.getByLabel("Password", { exact: true }).fill("seven larches lean to the west");
  await form.getByLabel("Shop’s name").fill("Nobody’s Pianos");
  await form.getByRole("button", { name: "Open the book" }).click();
  await expect(page.getByRole("status")).toContainText(`We have sent a mail to ${known}`);
  expect(await linkMailedTo(known, /have a sign-in for Agraffe already/)).toMatch(/\/sign-in$/);
});

test("an invited technician joins by the mailed link, under the address invited and with that role", async ({
  page,
  browser,
}) => {
  await openNewShop(page, "Ebb and Flow Pianos");
  const invited = newPerson("Tam Quill");
  await page.goto("/shop/team");
  const form = page.getByRole("form", { name: "Invite somebody" });
  await form.getByLabel("Mail address").fill(invited.email);
  await form.getByLabel("Role").selectOption({ label: "Technician" });
  await form.getByRole("button", { name: "Send the invitation" }).click();
  await expect(page.getByRole("button", { name: `Revoke the invitation to ${invited.email}` })).toBeVisible();

  const theirs = await otherDevice(browser);
  await theirs.goto(await linkMailedTo(invited.email, /invites you/));
  await expect(theirs.getByRole("heading", { name: "Join Ebb and Flow Pianos" })).toBeVisible();
  await expect(theirs.getByText("Ida Farrow invites you as a technician.")).toBeVisible();
  await expect(theirs.getByLabel("Mail address")).toHaveValue(invited.email);
  await theirs.getByLabel("Your name").fill(invited.name);
  await theirs.getByLabel("Password", { exact: true }).fill(invited.password);
  await theirs.getByRole("button", { name: "Accept the invitation" }).click();
  await expect(theirs).toHaveURL(/\/today$/);
  await theirs.goto("/shop/account");
  await expect(theirs.getByText("Technician", { exact: true }).first()).toBeVisible();

  await page.reload();
  await expect(page.getByLabel("Role of Tam Quill")).toHaveValue("technician");
  await expect(page.getByText("None is open")).toBeVisible();
});

test("with two-step sign-in on, the password alone opens nothing; a recovery code works once", async ({
  page,
  browser,
}) => {
  const owner = await openNewShop(page, "Second Step Pianos");
  await page.goto("/shop/account");
  await page.getByRole("button", { name: "Turn it on" }).click();
  await page.getByLabel("Turn on two-step sign-in: your password").fill(owner.password);
  await page.getByRole("button", { name: "Go on" }).click();
  const enrol = page.getByRole("form", { name: "Confirm the authenticator" });
  await expect(page.getByRole("img", { name: /QR code/ })).toBeVisible();
  const secret = fromBase32((await page.getByText(/^[A-Z2-7]{4}( [A-Z2-7]{1,4})+$/).textContent()) ?? "");
  await enrol.getByLabel("Code").fill("000000");
  await enrol.getByRole("button", { name: "Turn it on" }).click();
  await expect(enrol.getByRole("alert")).toContainText("This code does not fit.");
  await enrol.getByLabel("Code").fill(totp(secret, Date.now() / 1000));
  await enrol.getByRole("button", { name: "Turn it on" }).click();
  await expect(page.getByText("Two-step sign-in is on. Keep these recovery codes.")).toBeVisible();
  const listed = page.getByRole("listitem").filter({ hasText: /^\S{5}-\S{5}$/ });
  await expect(listed).toHaveCount(10);
  const recoveryCode = (await listed.first().textContent()) ?? "";
  await page.getByRole("button", { name: "I have kept them" }).click();
  await expect(
    page.getByText("On: after the password, a code from your authenticator is asked."),
  ).toBeVisible();

  const phone = await otherDevice(browser);
  await phone.goto("/sign-in?next=%2Fvisits");
  await signIn(phone, owner);
  await expect(phone.getByRole("heading", { name: "Second step" })).toBeVisible();
  await phone.goto("/today");
  await expect(phone).toHaveURL(/\/sign-in/);
  await phone.goto("/second-step?next=%2Fvisits");
  await phone.getByLabel("Code").fill(totp(secret, Date.now() / 1000));
  await phone.getByRole("button", { name: "Sign in" }).click();
  await expect(phone).toHaveURL(/\/visits$/);

  for (const outcome of ["opens", "is used up"]) {
    const laptop = await otherDevice(browser);
    await laptop.goto("/sign-in");
    await signIn(laptop, owner);
    await laptop.getByRole("link", { name: "Use a recovery code" }).click();
    await laptop.getByLabel("Recovery code").fill(recoveryCode);
    await laptop.getByRole("button", { name: "Sign in" }).click();
    if (outcome === "opens") await expect(laptop).toHaveURL(/\/today$/);
    else
      await expect(laptop.getByRole("form").getByRole("alert")).toContainText(
        "none of your unused recovery codes",
      );
  }
});

test("a sign-in elsewhere is listed and can be ended from here", async ({ page, browser }) => {
  const owner = await openNewShop(page, "Two Desks Pianos");
  // What a client says of its own address is not believed, under either name.
  const claimed = "203.0.113.77";
  const context = await browser.newContext({
    extraHTTPHeaders: { "x-forwarded-for": claimed, "x-client-address": claimed },
  });
  const lost = await context.newPage();
  await lost.goto("/sign-in");
  await signIn(lost, owner);
  await expect(lost).toHaveURL(/\/today$/);

  await page.goto("/shop/account");
  await expect(page.getByText("this device")).toHaveCount(1);
  await expect(page.getByText(claimed)).toHaveCount(0);
  await expect(page.getByText(/127\.0\.0\.1/).first()).toBeVisible();
  const end = page.getByRole("button", { name: /^Sign out .* on Linux/ });
  await end.click();
  await expect(page.getByText(/on Linux is signed out\.$/)).toBeVisible();
  await expect(end).toHaveCount(0);
  await lost.reload();
  await expect(lost).toHaveURL(/\/sign-in\?next=%2Ftoday$/);
  await page.reload();
  await expect(page.getByRole("heading", { name: "Your account" })).toBeVisible();
});
