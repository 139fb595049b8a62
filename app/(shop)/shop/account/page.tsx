import type { Metadata } from "next";
import { headers } from "next/headers";
import { redirect } from "next/navigation";
import { NameForm } from "@/components/people/name-form";
import { PasswordForm } from "@/components/people/password-form";
import { SessionList } from "@/components/people/session-list";
import { ShopSwitch } from "@/components/people/shop-switch";
import { TwoStep } from "@/components/people/two-step";
import { PageSection } from "@/components/shell/page-section";
import { WorkHead } from "@/components/shell/spread";
import { currentPerson } from "@/lib/auth/actor";
import { showInstant } from "@/lib/dates";
import { signedInActor } from "@/lib/pages/page-actor";
import { listSessions } from "@/lib/people/account/service";
import { deviceWords } from "@/lib/people/device";
import { roleWords } from "@/lib/people/role-words";
import { getShop } from "@/lib/shop/service";
import {
  beginTwoStepAction,
  changeNameAction,
  changePasswordAction,
  confirmTwoStepAction,
  endOtherSessionsAction,
  endSessionAction,
  endTwoStepAction,
  newRecoveryCodesAction,
  switchShopAction,
} from "./actions";

export const metadata: Metadata = { title: "Your account" };

export default async function AccountPage() {
  const actor = await signedInActor();
  const person = await currentPerson();
  if (!person) redirect("/sign-in");
  const [shop, sessions] = await Promise.all([getShop(actor), listSessions(actor, await headers())]);
  const at = (instant: string) => showInstant(instant, shop.locale, shop.timeZone);
  return (
    <>
      <WorkHead title="Your account" summary={`You sign in as ${person.email}.`} />
      <div className="grid max-w-160 gap-9">
        <PageSection title="Name">
          <NameForm key={person.name} action={changeNameAction} name={person.name} />
        </PageSection>
        <PageSection title="Two-step sign-in">
          <TwoStep
            on={person.secondStep}
            beginAction={beginTwoStepAction}
            confirmAction={confirmTwoStepAction}
            endAction={endTwoStepAction}
            newCodesAction={newRecoveryCodesAction}
          />
        </PageSection>
        <PageSection title="Password">
          <PasswordForm action={changePasswordAction} email={person.email} secondStep={person.secondStep} />
        </PageSection>
        <PageSection title="Where you are signed in">
          <SessionList
            sessions={sessions.map((session) => ({
              id: session.id,
              current: session.current,
              device: deviceWords(session.device),
              details: `${session.address ? `from ${session.address}, ` : ""}since ${at(session.since)}`,
            }))}
            endAction={endSessionAction}
            endOthersAction={endOtherSessionsAction}
          />
        </PageSection>
        <PageSection title={<span id="shops">Your shops</span>}>
          <ShopSwitch
            shops={person.memberships.map(({ shopId, shopName, role }) => ({
              shopId,
              shopName,
              role: roleWords[role],
              current: shopId === actor.shopId,
            }))}
            action={switchShopAction}
          />
        </PageSection>
      </div>
    </>
  );
}
