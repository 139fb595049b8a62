import type { Metadata } from "next";
import { ResetPasswordForm } from "@/components/people/reset-password-form";
import { AuthPage } from "@/components/shell/auth-page";
import { AppLink } from "@/components/ui/app-link";
import { LinkButton } from "@/components/ui/button";
import { ErrorState } from "@/components/ui/states";
import { resetLinkWorks } from "@/lib/people/sign-in/service";
import { resetPasswordAction } from "./actions";

export const metadata: Metadata = { title: "Set a new password" };

/** Opening the link changes nothing: programs that look through mail open links too. The button uses it. */
export default async function ResetPasswordPage({
  searchParams,
}: {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}) {
  const { token } = await searchParams;
  const whole = typeof token === "string" && token !== "" ? token : null;
  const works = whole !== null && (await resetLinkWorks(whole));
  return (
    <AuthPage
      title="Set a new password"
      subtitle={works ? "Every device is signed out when it is set." : undefined}
      footer={
        <AppLink href="/sign-in" className="link link-alone">
          Back to sign-in
        </AppLink>
      }
    >
      {whole && works ? (
        <ResetPasswordForm action={resetPasswordAction} token={whole} />
      ) : (
        <ErrorState
          title={whole ? "This link has been used or has expired" : "This link is not whole"}
          action={<LinkButton href="/forgot-password">Ask for a new link</LinkButton>}
        >
          {whole
            ? "It works once, for one hour. Your password is as it was last set."
            : "Copy all of it from the mail, or ask for a new one."}
        </ErrorState>
      )}
    </AuthPage>
  );
}
