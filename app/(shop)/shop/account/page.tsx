import type { Metadata } from "next";
import { AccountSections } from "@/components/people/account-sections";
import { WorkHead } from "@/components/shell/spread";
import { accountView } from "@/lib/pages/account-view";
import { staffActor } from "@/lib/pages/page-actor";
import * as actions from "./actions";

export const metadata: Metadata = { title: "Your account" };

export default async function AccountPage() {
  const account = await accountView(await staffActor());
  return (
    <>
      <WorkHead title="Your account" summary={`You sign in as ${account.email}.`} />
      <AccountSections account={account} actions={{ ...actions }} />
    </>
  );
}
