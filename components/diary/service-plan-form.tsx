"use client";

import { useQueryClient } from "@tanstack/react-query";
import { ActionForm, SubmitButton } from "@/components/forms/action-form";
import { Checkbox } from "@/components/forms/checkbox";
import { FieldError } from "@/components/forms/field";
import { Select } from "@/components/forms/select";
import { NumberInput, TextInput } from "@/components/forms/text-input";
import { useActionForm } from "@/components/forms/use-action-form";
import { Button } from "@/components/ui/button";
import { showMessage } from "@/components/ui/message-queue";
import { Segmented } from "@/components/ui/segmented";
import { dueKeys } from "@/lib/diary/keys";
import { formOf, servicePlanForm, type ServicePlanForm as Values } from "@/lib/diary/service-plans/form";
import type { ServicePlanRecord } from "@/lib/diary/service-plans/schema";
import { monthName, weekdayName } from "@/lib/diary/words";
import type { ActionResult } from "@/lib/doors/action-result";

const kinds: { value: Values["kind"]; label: string }[] = [
  { value: "interval", label: "Every so often" },
  { value: "months", label: "By season" },
  { value: "events", label: "Before events" },
];
const upTo = (count: number) => Array.from({ length: count }, (_, index) => index + 1);

/** When an instrument is to be served. Hangs on its instrument's record and is saved apart from it. */
export function ServicePlanForm({
  instrumentId,
  plan,
  technicians,
  locale,
  save,
  remove,
}: {
  instrumentId: string;
  plan: ServicePlanRecord | null;
  technicians: readonly { id: string; name: string }[];
  locale: string;
  save: (input: unknown) => Promise<ActionResult<ServicePlanRecord>>;
  remove: (input: unknown) => Promise<ActionResult<unknown>>;
}) {
  const client = useQueryClient();
  const saved = async (text: string) => {
    await client.invalidateQueries({ queryKey: dueKeys.all });
    showMessage({ text });
  };
  const state = useActionForm({
    schema: servicePlanForm,
    action: save,
    defaultValues: formOf(instrumentId, plan),
    onSuccess: () => saved("The service plan is saved."),
  });
  const { form } = state;
  const [kind, months, weekdays, rests] = form.watch(["kind", "months", "weekdays", "rests"]);
  const newer =
    state.failure?.code === "stale" ? (state.failure.current as ServicePlanRecord | null) : undefined;

  async function removePlan() {
    const result = await remove({ instrumentId, version: plan?.version ?? 0 });
    if (result.ok) await saved("The instrument has no service plan any more.");
    else showMessage({ kind: "attention", text: result.error.message });
  }

  return (
    <ActionForm state={state} label="Service plan" className="max-w-160">
      {newer === undefined ? null : (
        <p>
          <Button size="small" onClick={() => form.reset(formOf(instrumentId, newer))}>
            Take the newer plan
          </Button>
        </p>
      )}
      <Segmented
        label="Due"
        hideLabel={false}
        options={kinds}
        value={kind}
        onChange={(next) => form.setValue("kind", next, { shouldDirty: true })}
      />
      {kind === "interval" ? (
        <div className="grid gap-x-6 gap-y-4 sm:grid-cols-2">
          <NumberInput label="Every" whole {...state.numberField("every")} />
          <Select
            label="Of these"
            options={[
              { value: "week", label: "weeks" },
              { value: "month", label: "months" },
            ]}
            {...state.field("unit")}
          />
        </div>
      ) : null}
      {kind === "months" ? (
        <Choices
          label="In each of these months"
          options={upTo(12).map((month) => ({ value: String(month), label: monthName(month, locale) }))}
          chosen={months}
          error={form.formState.errors.months?.message}
          onChange={(next) => form.setValue("months", next, { shouldDirty: true, shouldValidate: true })}
        />
      ) : null}
      {kind === "events" ? (
        <NumberInput
          label="Days before each event of the site"
          whole
          unit="days"
          className="sm:max-w-77"
          {...state.numberField("daysBefore")}
        />
      ) : null}
      <div className="grid gap-x-6 gap-y-4 sm:grid-cols-2">
        <TextInput label="Work" {...state.field("work")} />
        <NumberInput label="Takes" whole unit="minutes" {...state.numberField("workMinutes")} />
        <Select
          label="Technician"
          options={[
            { value: "", label: "Anybody" },
            ...technicians.map(({ id, name }) => ({ value: id, label: name })),
          ]}
          {...state.field("technicianId")}
        />
        <TextInput
          label="Last served before this book"
          optional
          type="date"
          help="Counts until a visit here is done."
          {...state.field("servedBefore")}
        />
      </div>
      <Choices
        label="The customer prefers"
        options={upTo(7).map((day) => ({ value: String(day), label: weekdayName(day, locale, "short") }))}
        chosen={weekdays}
        onChange={(next) => form.setValue("weekdays", next, { shouldDirty: true })}
      />
      <div className="grid gap-x-6 gap-y-4 sm:grid-cols-2">
        <TextInput label="From" optional type="time" {...state.field("hoursFrom")} />
        <TextInput label="Until" optional type="time" {...state.field("hoursUntil")} />
      </div>
      <div className="grid items-end gap-x-6 gap-y-4 sm:grid-cols-2">
        <Checkbox
          label="Resting"
          help="Not due until it is woken: moved out, sold, not wanted for now."
          {...form.register("rests")}
          defaultChecked={plan?.rests ?? false}
        />
        {rests ? <TextInput label="Rests until" optional type="date" {...state.field("restsUntil")} /> : null}
      </div>
      <div className="flex flex-wrap items-center gap-3">
        <SubmitButton state={state} busyLabel="Saving" kind="secondary">
          Save plan
        </SubmitButton>
        {plan ? (
          <Button kind="quiet" onClick={removePlan}>
            No plan any more
          </Button>
        ) : null}
      </div>
    </ActionForm>
  );
}

function Choices({
  label,
  options,
  chosen,
  error,
  onChange,
}: {
  label: string;
  options: readonly { value: string; label: string }[];
  chosen: readonly string[];
  error?: string | undefined;
  onChange: (chosen: string[]) => void;
}) {
  return (
    <fieldset>
      <legend className="font-medium">{label}</legend>
      <div className="flex flex-wrap gap-x-5">
        {options.map((option) => (
          <Checkbox
            key={option.value}
            label={option.label}
            checked={chosen.includes(option.value)}
            onChange={(event) =>
              onChange(
                options
                  .map(({ value }) => value)
                  .filter((value) =>
                    value === option.value ? event.target.checked : chosen.includes(value),
                  ),
              )
            }
          />
        ))}
      </div>
      {error ? <FieldError>{error}</FieldError> : null}
    </fieldset>
  );
}
