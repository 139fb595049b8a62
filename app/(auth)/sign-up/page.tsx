import type { Metadata, Route } from "next";
import { headers } from "next/headers";
import { redirect } from "next/navigation";
import { SignUpForm } from "@/components/people/sign-up-form";
import { AuthPage } from "@/components/shell/auth-page";
import { AppLink } from "@/components/ui/app-link";
import { currentPerson } from "@/lib/auth/actor";
import { ownPath } from "@/lib/auth/next-path";
import { newId } from "@/lib/ids";
import { shopChoices } from "@/lib/shop/choices";
import { signUpAction } from "./actions";

export const metadata: Metadata = { title: "Open a book" };

export default async function SignUpPage({
  searchParams,
}: {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}) {
  const next = ownPath((await searchParams).next);
  const person = await currentPerson();
  if (person) redirect((person.actor ? next : "/open-shop") as Route);
  return (
    <AuthPage
      title="Open your shop’s book"
      subtitle="You become the shop’s owner and invite the others."
      footer={
        <>
          Already in a shop?{" "}
          <AppLink href="/sign-in" className="link">
            Sign in
          </AppLink>
        </>
      }
    >
      <SignUpForm
        action={signUpAction}
        next={next}
        shopId={newId()}
        choices={shopChoices((await headers()).get("accept-language"))}
      />
    </AuthPage>
  );
}
