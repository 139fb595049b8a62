"use client";

import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { Select } from "@/components/forms/select";
import { TextInput } from "@/components/forms/text-input";
import { useActionForm } from "@/components/forms/use-action-form";
import { showMessage } from "@/components/ui/message-queue";
import { roles } from "@/lib/auth/access";
import type { ActionResult } from "@/lib/doors/action-result";
import { roleMeaning, roleWords } from "@/lib/people/role-words";
import { type InvitationRecord, invitationInput } from "@/lib/people/schema";
import { CustomerChoice } from "./customer-choice";

export function InviteForm({
  action,
  unavailable,
}: {
  action: (input: unknown) => Promise<ActionResult<InvitationRecord>>;
  unavailable: string | null;
}) {
  const state = useActionForm({
    schema: invitationInput,
    action,
    defaultValues: { email: "", role: "technician", customerId: "" },
    onSuccess: ({ email }) => {
      showMessage({ text: `The invitation is on its way to ${email}.` });
      state.form.reset();
    },
  });
  const role = state.form.watch("role");
  return (
    <ActionForm state={state} label="Invite somebody">
      <div className="grid gap-x-6 gap-y-4 sm:grid-cols-[minmax(0,1fr)_220px]">
        <TextInput
          label="Mail address"
          type="email"
          autoComplete="off"
          autoCapitalize="none"
          spellCheck={false}
          {...state.field("email")}
        />
        <Select
          label="Role"
          options={roles.map((value) => ({ value, label: roleWords[value] }))}
          help={roleMeaning[role]}
          {...state.field("role")}
        />
      </div>
      {role === "customer" ? (
        <CustomerChoice
          error={state.field("customerId").error}
          value={state.form.watch("customerId") ?? ""}
          onChange={(id) => state.form.setValue("customerId", id, { shouldValidate: true })}
        />
      ) : null}
      <div>
        <SubmitButton state={state} busyLabel="Sending" disabledReason={unavailable ?? undefined}>
          Send the invitation
        </SubmitButton>
      </div>
    </ActionForm>
  );
}
