"use client";

import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { Checkbox } from "@/components/forms/checkbox";
import { PasswordInput, TextInput } from "@/components/forms/text-input";
import { useActionForm } from "@/components/forms/use-action-form";
import { AppLink } from "@/components/ui/app-link";
import { signInInput } from "@/lib/people/schema";
import { type DemoPeople, DemoSignIns } from "./demo-sign-ins";
import { type GoingOn, goTo } from "./go-to";
import { MailboxLink } from "./mailbox-link";
import type { MailingTo } from "./mailing-to";
import { SendConfirmationAgain } from "./send-confirmation-again";

export function SignInForm({
  action,
  sendConfirmation,
  mailboxHref,
  next,
  demo,
}: {
  action: GoingOn;
  sendConfirmation: MailingTo;
  mailboxHref: string | null;
  next: string;
  demo: DemoPeople | null;
}) {
  const state = useActionForm({
    schema: signInInput,
    action,
    defaultValues: { email: "", password: "", stay: true, next },
    onSuccess: goTo,
  });
  return (
    <>
      <ActionForm state={state} label="Sign in">
        <TextInput
          label="Mail address"
          type="email"
          autoComplete="username"
          autoCapitalize="none"
          spellCheck={false}
          {...state.field("email")}
        />
        <PasswordInput
          label="Password"
          aside={
            <AppLink
              href="/forgot-password"
              className="link touch:-mt-4 touch:-mb-2 touch:inline-flex touch:h-11 touch:items-end touch:pb-2"
            >
              Forgotten?
            </AppLink>
          }
          {...state.field("password")}
        />
        <Checkbox
          label="Stay signed in on this device for 30 days"
          className="-mt-2"
          defaultChecked
          {...state.form.register("stay")}
        />
        <SubmitButton state={state} size="big" busyLabel="Signing in">
          Sign in
        </SubmitButton>
      </ActionForm>
      {state.failure?.code === "unconfirmed" ? (
        <div className="mt-4 grid gap-3">
          <SendConfirmationAgain email={state.form.getValues("email")} action={sendConfirmation} />
          <MailboxLink href={mailboxHref} />
        </div>
      ) : null}
      {demo ? (
        <DemoSignIns
          demo={demo}
          onChoose={(email) => {
            state.form.setValue("email", email);
            state.form.setValue("password", demo.password);
            state.form.clearErrors();
          }}
        />
      ) : null}
    </>
  );
}
