import type { Metadata, Route } from "next";
import { redirect } from "next/navigation";
import { SignInForm } from "@/components/people/sign-in-form";
import { AuthPage } from "@/components/shell/auth-page";
import { AppLink } from "@/components/ui/app-link";
import { StateWord } from "@/components/ui/state-word";
import { currentPerson } from "@/lib/auth/actor";
import { ownPath } from "@/lib/auth/next-path";
import { env } from "@/lib/env";
import { hasLocalMailbox } from "@/lib/mail/mailbox";
import { demoSignIns } from "@/lib/people/demo-sign-ins";
import { sendConfirmationAction } from "../confirm-address/actions";
import { signInAction } from "./actions";

export const metadata: Metadata = { title: "Sign in" };

export default async function SignInPage({
  searchParams,
}: {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}) {
  const { next, done } = await searchParams;
  const goTo = ownPath(next);
  if (await currentPerson()) redirect(goTo as Route);
  const query = goTo === "/" ? "" : `?next=${encodeURIComponent(goTo)}`;
  return (
    <AuthPage
      title="Sign in"
      subtitle="The service book of your piano business."
      footer={
        <>
          New here?{" "}
          <AppLink href={`/sign-up${query}`} className="link">
            Open a book for your shop
          </AppLink>
        </>
      }
    >
      {done === "password" ? (
        <p role="status" className="mb-5">
          <StateWord kind="done" wrap>
            The new password is set, and every device is signed out. Sign in with it.
          </StateWord>
        </p>
      ) : null}
      <SignInForm
        action={signInAction}
        sendConfirmation={sendConfirmationAction}
        mailboxHref={hasLocalMailbox() ? "/mailbox" : null}
        next={goTo}
        demo={env().LOCAL_SERVICES ? demoSignIns : null}
      />
    </AuthPage>
  );
}
