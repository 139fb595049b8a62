"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { showMessage } from "@/components/ui/message-queue";
import { StateWord } from "@/components/ui/state-word";
import type { ActionResult } from "@/lib/doors/action-result";
import type { TwoStepSetup } from "@/lib/people/two-step/service";
import { PasswordAsk } from "./password-ask";
import { RecoveryCodes } from "./recovery-codes";
import { TwoStepEnrol } from "./two-step-enrol";

type Step =
  | { at: "rest" }
  | { at: "ask"; for: "begin" | "end" | "codes" }
  | { at: "enrol"; setup: TwoStepSetup }
  | { at: "codes"; codes: readonly string[] };

type Act<T> = (input: unknown) => Promise<ActionResult<T>>;

export function TwoStep({
  on,
  beginAction,
  confirmAction,
  endAction,
  newCodesAction,
}: {
  on: boolean;
  beginAction: Act<TwoStepSetup>;
  confirmAction: Act<null>;
  endAction: Act<null>;
  newCodesAction: Act<{ recoveryCodes: string[] }>;
}) {
  const router = useRouter();
  const [step, setStep] = useState<Step>({ at: "rest" });
  const rest = () => setStep({ at: "rest" });

  if (step.at === "codes") {
    return (
      <RecoveryCodes
        codes={step.codes}
        onDone={() => {
          rest();
          router.refresh();
        }}
      />
    );
  }
  if (step.at === "enrol") {
    const { setup } = step;
    return (
      <TwoStepEnrol
        setup={setup}
        action={confirmAction}
        onConfirmed={() => setStep({ at: "codes", codes: setup.recoveryCodes })}
        onCancel={rest}
      />
    );
  }
  if (step.at === "ask" && step.for === "begin") {
    return (
      <PasswordAsk<TwoStepSetup>
        label="Turn on two-step sign-in"
        button="Go on"
        action={beginAction}
        onSuccess={(setup) => setStep({ at: "enrol", setup })}
        onCancel={rest}
      />
    );
  }
  if (step.at === "ask" && step.for === "codes") {
    return (
      <PasswordAsk<{ recoveryCodes: string[] }>
        label="Make new recovery codes"
        help="The codes you have now stop working."
        button="Make new codes"
        action={newCodesAction}
        onSuccess={({ recoveryCodes }) => setStep({ at: "codes", codes: recoveryCodes })}
        onCancel={rest}
      />
    );
  }
  if (step.at === "ask") {
    return (
      <PasswordAsk<null>
        label="Turn off two-step sign-in"
        help="Your password alone will then open the book."
        button="Turn it off"
        action={endAction}
        onSuccess={() => {
          rest();
          showMessage({ text: "Two-step sign-in is off." });
        }}
        onCancel={rest}
      />
    );
  }
  if (on) {
    return (
      <div className="grid gap-3">
        <StateWord kind="done" wrap>
          On: after the password, a code from your authenticator is asked.
        </StateWord>
        <div className="flex flex-wrap gap-2">
          <Button onClick={() => setStep({ at: "ask", for: "codes" })}>New recovery codes</Button>
          <Button onClick={() => setStep({ at: "ask", for: "end" })}>Turn it off</Button>
        </div>
      </div>
    );
  }
  return (
    <div className="grid gap-3">
      <p>
        Off. With it on, whoever learns your password still cannot sign in: a code from an authenticator on
        your phone is asked as well.
      </p>
      <div>
        <Button onClick={() => setStep({ at: "ask", for: "begin" })}>Turn it on</Button>
      </div>
    </div>
  );
}
