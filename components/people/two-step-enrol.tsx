"use client";

import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { TextInput } from "@/components/forms/text-input";
import { useActionForm } from "@/components/forms/use-action-form";
import { Button } from "@/components/ui/button";
import type { ActionResult } from "@/lib/doors/action-result";
import { codeInput } from "@/lib/people/schema";
import type { TwoStepSetup } from "@/lib/people/two-step/service";

/** The secret is handed over, and a code made from it comes back, before anything changes at sign-in. */
export function TwoStepEnrol({
  setup,
  action,
  onConfirmed,
  onCancel,
}: {
  setup: TwoStepSetup;
  action: (input: unknown) => Promise<ActionResult<null>>;
  onConfirmed: () => void;
  onCancel: () => void;
}) {
  const state = useActionForm({
    schema: codeInput,
    action,
    defaultValues: { code: "" },
    onSuccess: onConfirmed,
  });
  const { path, size } = setup.qr;
  return (
    <div className="grid gap-5">
      <div className="flex flex-wrap items-start gap-6">
        <svg
          viewBox={`0 0 ${size} ${size}`}
          role="img"
          aria-label="QR code with the secret for your authenticator"
          shapeRendering="crispEdges"
          className="size-52 shrink-0 rounded border border-edge bg-white"
        >
          <path d={path} fill="#000000" />
        </svg>
        <div className="grid min-w-0 flex-1 basis-60 gap-2">
          <p>
            <b className="font-semibold">1.</b> Scan this with an authenticator on your phone, or type the
            secret into it:
          </p>
          <p className="text-16 font-semibold">{setup.secret.match(/.{1,4}/g)?.join(" ")}</p>
          <p>
            <b className="font-semibold">2.</b> Type the six digits it then shows.
          </p>
        </div>
      </div>
      <ActionForm state={state} label="Confirm the authenticator">
        <TextInput
          label="Code"
          inputMode="numeric"
          autoComplete="one-time-code"
          maxLength={11}
          className="max-w-60"
          {...state.field("code")}
        />
        <div className="flex flex-wrap gap-2">
          <SubmitButton state={state} busyLabel="Checking the code">
            Turn it on
          </SubmitButton>
          <Button onClick={onCancel}>Leave it off</Button>
        </div>
      </ActionForm>
    </div>
  );
}
