import { expect, test as setup } from "@playwright/test";
import { linkMailedTo } from "./support/mailbox";
import {
  type DemoPerson,
  demoPassword,
  demoPeople,
  ownOrigin,
  signedInAs,
  signInByRequest,
} from "./support/people";

for (const person of Object.keys(demoPeople) as DemoPerson[]) {
  setup(`the demo's ${person} signs in`, async ({ request }) => {
    await signInByRequest(request, demoPeople[person], demoPassword);
    await request.storageState({ path: signedInAs(person) });
  });
}

setup("a mail lies in the mailbox", async ({ request }) => {
  const email = demoPeople.office;
  const answer = await request.post("/api/auth/request-password-reset", {
    data: { email },
    headers: { origin: ownOrigin() },
  });
  expect(answer.ok()).toBe(true);
  await linkMailedTo(email, /new password/);
});
