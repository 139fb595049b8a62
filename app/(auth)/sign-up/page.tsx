import type { Metadata, Route } from "next";
import { headers } from "next/headers";
import { redirect } from "next/navigation";
import { SignUpForm } from "@/components/people/sign-up-form";
import { AuthPage } from "@/components/shell/auth-page";
import { AppLink } from "@/components/ui/app-link";
import { currentPerson } from "@/lib/auth/actor";
import { ownPath } from "@/lib/auth/next-path";
import { newId } from "@/lib/ids";
import { hasLocalMailbox } from "@/lib/mail/mailbox";
import { mailConfigured } from "@/lib/mail/send";
import { shopChoices } from "@/lib/shop/choices";
import { sendConfirmationAction } from "../confirm-address/actions";
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
        sendAgain={sendConfirmationAction}
        mailboxHref={hasLocalMailbox() ? "/mailbox" : null}
        unavailable={
          mailConfigured()
            ? null
            : "This server sends no mail, so your address cannot be confirmed. Ask whoever runs it to set SMTP_URL."
        }
        next={next}
        shopId={newId()}
        choices={shopChoices((await headers()).get("accept-language"))}
      />
    </AuthPage>
  );
}
