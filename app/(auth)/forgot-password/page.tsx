import type { Metadata } from "next";
import { ForgotPasswordForm } from "@/components/people/forgot-password-form";
import { AuthPage } from "@/components/shell/auth-page";
import { AppLink } from "@/components/ui/app-link";
import { hasLocalMailbox } from "@/lib/mail/mailbox";
import { mailConfigured } from "@/lib/mail/send";
import { requestResetAction } from "./actions";

export const metadata: Metadata = { title: "Forgotten password" };

export default function ForgotPasswordPage() {
  return (
    <AuthPage
      title="Forgotten password"
      subtitle="We mail you a link that lets you set a new one."
      footer={
        <AppLink href="/sign-in" className="link link-alone">
          Back to sign-in
        </AppLink>
      }
    >
      <ForgotPasswordForm
        action={requestResetAction}
        mailboxHref={hasLocalMailbox() ? "/mailbox" : null}
        unavailable={
          mailConfigured() ? null : "This server sends no mail. Ask whoever runs it to set SMTP_URL."
        }
      />
    </AuthPage>
  );
}
