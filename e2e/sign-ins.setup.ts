import { test as setup } from "@playwright/test";
import { type DemoPerson, demoPassword, demoPeople, signedInAs, signInByRequest } from "./support/people";

for (const person of Object.keys(demoPeople) as DemoPerson[]) {
  setup(`the demo's ${person} signs in`, async ({ request }) => {
    await signInByRequest(request, demoPeople[person], demoPassword);
    await request.storageState({ path: signedInAs(person) });
  });
}
