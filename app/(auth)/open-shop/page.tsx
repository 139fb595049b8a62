import type { Metadata } from "next";
import { headers } from "next/headers";
import { redirect } from "next/navigation";
import { OpenShopForm } from "@/components/people/open-shop-form";
import { SignOutButton } from "@/components/people/sign-out-button";
import { AuthPage } from "@/components/shell/auth-page";
import { AppLink } from "@/components/ui/app-link";
import { currentPerson } from "@/lib/auth/actor";
import { newId } from "@/lib/ids";
import { shopChoices } from "@/lib/shop/choices";
import { signOutAction } from "../sign-out/actions";
import { openShopAction } from "./actions";

export const metadata: Metadata = { title: "Open a shop" };

export default async function OpenShopPage() {
  const person = await currentPerson();
  if (!person) redirect("/sign-in?next=%2Fopen-shop");
  return (
    <AuthPage
      title={person.actor ? "Open another shop" : "Open your shop’s book"}
      subtitle={
        person.actor
          ? `You stay in ${person.actor.shopName} and can change between the two.`
          : "You are signed in, but belong to no shop yet. Invited somewhere? Open the link in that mail instead."
      }
      footer={
        <div className="flex flex-wrap items-center justify-between gap-3">
          <span className="min-w-0 break-words">Signed in as {person.email}</span>
          {person.actor ? (
            <AppLink href="/" className="link link-alone">
              Back to {person.actor.shopName}
            </AppLink>
          ) : (
            <SignOutButton action={signOutAction} />
          )}
        </div>
      }
    >
      <OpenShopForm
        action={openShopAction}
        shopId={newId()}
        choices={shopChoices((await headers()).get("accept-language"))}
      />
    </AuthPage>
  );
}
