"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useCallback, useRef, useState } from "react";
import {
  type DefaultValues,
  type FieldPath,
  type FieldValues,
  get,
  type RegisterOptions,
  type UseFormReturn,
  useForm,
} from "react-hook-form";
import type { z } from "zod";
import type { ActionResult } from "@/lib/doors/action-result";

export type FormFailure = {
  /** "refused": the server said no. "network": it did not answer, so sending again is safe to offer. */
  kind: "refused" | "network";
  code: string;
  message: string;
  /** The record as it stands now, when ours was out of date. */
  current?: unknown;
};

export type ActionFormOptions<Input extends FieldValues, Data> = {
  schema: z.ZodType<unknown, Input>;
  action: (input: unknown) => Promise<ActionResult<Data>>;
  defaultValues: DefaultValues<Input>;
  onSuccess?: (data: Data, input: Input) => unknown;
};

/**
 * One form, one schema, one server action. The schema is the one the action validates with, so the two
 * cannot disagree; what was typed stays in the fields whatever the answer is.
 */
export function useActionForm<Input extends FieldValues, Data>({
  schema,
  action,
  defaultValues,
  onSuccess,
}: ActionFormOptions<Input, Data>) {
  const form = useForm<Input, unknown, Input>({
    // Raw: the action parses the same values again, and a transformed value may not pass its own schema.
    resolver: zodResolver(schema, undefined, { raw: true }),
    defaultValues,
    mode: "onTouched",
    // The summary takes the focus, because it also carries errors that belong to no field.
    shouldFocusError: false,
  });
  const [failure, setFailure] = useState<FormFailure | null>(null);
  const [attempts, setAttempts] = useState(0);
  const [busy, setBusy] = useState(false);
  const sending = useRef(false);

  const send = useCallback(
    async (values: Input) => {
      // A second press before the first answer would write twice.
      if (sending.current) return;
      sending.current = true;
      setBusy(true);
      setFailure(null);
      try {
        const result = await action(values);
        if (result.ok) {
          await onSuccess?.(result.data, values);
          return;
        }
        showRefusal(form, result.error.fields);
        setFailure({
          kind: "refused",
          code: result.error.code,
          message: result.error.message,
          current: result.error.current,
        });
        setAttempts((count) => count + 1);
      } catch (error) {
        // redirect() and friends travel as thrown values that only the framework may handle.
        if (isFrameworkSignal(error)) throw error;
        setFailure({
          kind: "network",
          code: "network",
          message:
            "The server did not answer. What you typed is still here: check the connection and send it again.",
        });
        setAttempts((count) => count + 1);
      } finally {
        sending.current = false;
        setBusy(false);
      }
    },
    [action, form, onSuccess],
  );

  const submit = form.handleSubmit(send, () => {
    setFailure(null);
    setAttempts((count) => count + 1);
  });

  /** Spread into a field: registration and its error in one. */
  function field(name: FieldPath<Input>, options?: RegisterOptions<Input, FieldPath<Input>>) {
    return {
      ...form.register(name, options),
      defaultValue: shownAtFirst(get(defaultValues, name)),
      error: messageAt(form, name),
    };
  }

  /** A field whose empty text is "not given" rather than an empty string. */
  function optionalField(name: FieldPath<Input>) {
    return field(name, { setValueAs: emptyToUndefined });
  }

  /** A field whose text is read as a number; what is no number goes to the schema as typed. */
  function numberField(name: FieldPath<Input>) {
    return field(name, { setValueAs: readNumber });
  }

  return { form, submit, busy, failure, attempts, field, optionalField, numberField };
}

export type ActionForm = {
  submit: (event?: React.BaseSyntheticEvent) => Promise<void>;
  busy: boolean;
  failure: FormFailure | null;
  attempts: number;
  // biome-ignore lint/suspicious/noExplicitAny: the form's frame works for every shape of values
  form: UseFormReturn<any, any, any>;
};

/** Written by the server too, so that a field is never seen empty before the scripts are there. */
function shownAtFirst(value: unknown): string | number | undefined {
  return typeof value === "string" || typeof value === "number" ? value : undefined;
}

function showRefusal<Input extends FieldValues>(
  form: UseFormReturn<Input, unknown, Input>,
  fields: Record<string, string> | undefined,
) {
  for (const [path, message] of Object.entries(fields ?? {})) {
    form.setError(path as FieldPath<Input>, { type: "server", message });
  }
}

function messageAt<Input extends FieldValues>(
  form: UseFormReturn<Input, unknown, Input>,
  name: FieldPath<Input>,
): string | undefined {
  return form.getFieldState(name, form.formState).error?.message;
}

function isFrameworkSignal(error: unknown): boolean {
  return (
    typeof error === "object" &&
    error !== null &&
    "digest" in error &&
    typeof error.digest === "string" &&
    error.digest.startsWith("NEXT_")
  );
}

export function emptyToUndefined(typed: unknown): unknown {
  return typeof typed === "string" && typed.trim() === "" ? undefined : typed;
}

/** Reads "784,2", "784.2", "−3" (true minus) and " 58 "; anything else is handed on for the schema to refuse. */
export function readNumber(typed: unknown): unknown {
  if (typeof typed !== "string") return typed;
  const text = typed.trim().replace(/^\u2212/, "-");
  if (text === "") return undefined;
  const plain = /^[+-]?\d+(?:[.,]\d+)?$/.exec(text);
  return plain ? Number(text.replace(",", ".")) : typed;
}
