import { expect, test } from "@playwright/test";
import { demoRecords } from "./support/demo-records";
import { signedInAs } from "./support/people";

test.use({ storageState: signedInAs("office") });

test("the office plans an instrument's service, finds it due and books it from the list", async ({
  page,
}) => {
  const { instrumentId } = await demoRecords(page.request);
  const free = await page.request.get("/api/v1/due", {
    params: { state: "to-book", q: "conservatory", most: 1 },
  });
  const { items } = (await free.json()) as {
    items: { instrumentId: string; instrument: string; room: string }[];
  };
  const due = items.find((item) => item.instrumentId !== instrumentId);
  if (!due) throw new Error("Nothing of the demo's conservatory is due");

  await page.goto(`/instruments/${due.instrumentId}/record`);
  await page.getByText("Change the plan").click();
  const form = page.getByRole("form", { name: "Service plan" });
  await form.getByLabel("Every", { exact: true }).fill("six");
  await form.getByRole("button", { name: "Save plan" }).click();
  await expect(form.getByRole("alert")).toContainText("From 1 to 120.");
  await form.getByLabel("Every", { exact: true }).fill("5");
  await form.getByLabel("Takes").fill("110");
  await form.getByLabel("Technician").selectOption({ label: "Nadia Ferris" });
  await form.getByRole("button", { name: "Save plan" }).click();
  await expect(page.getByText("every 5 months")).toBeVisible();

  await page.goto("/due?state=overdue");
  await page.getByRole("row").filter({ hasText: due.instrument }).first().click();
  await expect(page).toHaveURL(/\/visits\/new\?/);
  const booking = page.getByRole("form", { name: "Book a visit" });
  await expect(booking.getByLabel("Length")).toHaveValue("120");
  await expect(booking.getByLabel("Nadia Ferris")).toBeChecked();
});
