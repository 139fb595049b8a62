import type { Metadata } from "next";
import * as actions from "@/app/(shop)/shop/account/actions";
import { AccountSections } from "@/components/people/account-sections";
import { CustomerPage } from "@/components/shell/customer-page";
import { AppLink } from "@/components/ui/app-link";
import { accountView } from "@/lib/pages/account-view";
import { customerActor } from "@/lib/pages/page-actor";

export const metadata: Metadata = { title: "Your account" };

export default async function CustomerAccountPage() {
  const actor = await customerActor();
  const account = await accountView(actor);
  return (
    <CustomerPage shop={{ name: actor.shopName, line: actor.name }}>
      <h1>Your account</h1>
      <p className="mb-7 break-words text-ink-soft">You sign in as {account.email}.</p>
      <AccountSections account={account} actions={{ ...actions }} />
      <p className="mt-9">
        <AppLink href="/my" className="link inline-flex min-h-11 items-center">
          Back to your instruments and visits
        </AppLink>
      </p>
    </CustomerPage>
  );
}
