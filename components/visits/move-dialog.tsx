"use client";

import { useRouter } from "next/navigation";
import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { AskAgain } from "@/components/forms/ask-again";
import { Checkbox } from "@/components/forms/checkbox";
import { TextArea, TextInput } from "@/components/forms/text-input";
import { useActionForm } from "@/components/forms/use-action-form";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { showMessage } from "@/components/ui/message-queue";
import type { ActionResult } from "@/lib/doors/action-result";
import { visitMove } from "@/lib/visits/schema";
import { Clash, clashOf } from "./clash";
import { dayHelp, dayWithYear, hoursOf } from "./time-words";

export type MovedVisit = { movedToId: string | null };

type Props = {
  visit: { id: string; version: number; start: string; end: string };
  locale: string;
  action: (input: unknown) => Promise<ActionResult<MovedVisit>>;
  onClose: () => void;
};

export function MoveDialog({ open, ...props }: Props & { open: boolean }) {
  return (
    <Dialog open={open} onClose={props.onClose} title="Move to another time">
      {/* Made anew at each opening, with the version and time of the visit as it then is. */}
      {open ? <MoveForm {...props} /> : null}
    </Dialog>
  );
}

function MoveForm({ visit, locale, action, onClose }: Props) {
  const router = useRouter();
  const state = useActionForm({
    schema: visitMove,
    action,
    defaultValues: {
      id: visit.id,
      version: visit.version,
      reason: "",
      date: visit.start.slice(0, 10),
      time: visit.start.slice(11, 16),
      confirmed: false,
    },
    onSuccess: ({ movedToId }) => {
      onClose();
      showMessage({ text: "The visit is moved.", detail: "This is where it went." });
      if (movedToId) router.push(`/visits/${movedToId}`);
    },
  });
  const clash = clashOf(state.failure);
  return (
    <ActionForm state={state} label="Move to another time" className="mt-2">
      <p className="text-ink-soft">
        Now {dayWithYear(visit.start, locale)}, {hoursOf(visit, locale)}. It keeps its length, its people and
        its work.
      </p>
      <div className="grid grid-cols-2 gap-3">
        <TextInput
          label="New day"
          type="date"
          help={dayHelp(state.form.watch("date"), locale)}
          {...state.field("date")}
        />
        <TextInput label="Starts" type="time" {...state.field("time")} />
      </div>
      <AskAgain
        state={state}
        about={state.form.watch(["date", "time"]).join(" ")}
        question="Move it all the same"
        onYes={async () => {
          state.form.setValue("confirm", true);
          await state.submit();
          // Another time is another question.
          state.form.setValue("confirm", false);
        }}
      />
      {clash ? (
        <Clash clash={clash} locale={locale} onTake={(time) => state.form.setValue("time", time)} />
      ) : null}
      <TextArea label="Why it moves" rows={2} words {...state.field("reason")} />
      <Checkbox label="The customer has agreed to the new time" {...state.form.register("confirmed")} />
      <div className="flex flex-wrap justify-end gap-2">
        <Button data-safe="" onClick={onClose}>
          Keep the time
        </Button>
        <SubmitButton state={state}>Move visit</SubmitButton>
      </div>
    </ActionForm>
  );
}
