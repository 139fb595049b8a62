"use client";

import type { Route } from "next";
import { useRouter } from "next/navigation";
import { useMemo, useRef, useState, useTransition } from "react";
import { v7 } from "uuid";
import { Select } from "@/components/forms/select";
import { NumberInput, TextInput } from "@/components/forms/text-input";
import { intervalWords } from "@/components/plans/beat-words";
import { Button } from "@/components/ui/button";
import { showMessage } from "@/components/ui/message-queue";
import { Sign } from "@/components/ui/sign";
import type { RegisterStyle } from "@/lib/acoustics";
import type { ActionResult } from "@/lib/doors/action-result";
import { type PreviewInstrument, registerStyle, type StyleRecord, styleFields } from "@/lib/plans/schema";
import {
  draftOf,
  draftRule,
  newRule,
  ruleKey,
  type StyleDraft,
  styleOf,
  weighableIntervals,
} from "./style-draft";
import { StylePreview } from "./style-preview";
import { WeightsTable } from "./weights-table";

type Props = {
  /** The style to change, or what a new one begins with. */
  style: RegisterStyle & { name: string };
  saved: { id: string; version: number } | null;
  canChange: boolean;
  /** The shop's instruments to try it on, the one with the most readings first. */
  instruments: readonly PreviewInstrument[];
  /** What a new style begins with, in a sentence: "Even, built in". */
  beginsWith?: string;
  create: (input: unknown) => Promise<ActionResult<StyleRecord>>;
  change: (input: unknown) => Promise<ActionResult<StyleRecord>>;
};

export function StyleEditor(props: Props) {
  const { style, saved, canChange, instruments, beginsWith = "its beginning", create, change } = props;
  const router = useRouter();
  const [draft, setDraft] = useState(() => draftOf(style));
  const [errors, setErrors] = useState<Record<string, string>>({});
  const [failure, setFailure] = useState<string>();
  const [pending, startSaving] = useTransition();
  const id = useRef(saved?.id ?? v7());
  const edit = (part: Partial<StyleDraft>) => setDraft((current) => ({ ...current, ...part }));

  const typed = useMemo(() => styleOf(draft), [draft]);
  const preview = useMemo(() => {
    const read = registerStyle.safeParse(typed);
    return read.success ? read.data : null;
  }, [typed]);
  const open = weighableIntervals.filter(
    (interval) => !draft.rules.some(({ rule }) => ruleKey(rule) === ruleKey(interval)),
  );

  function save() {
    const read = styleFields.safeParse(typed);
    if (!read.success) {
      setErrors(
        Object.fromEntries(read.error.issues.map((issue) => [issue.path.join("."), wordsFor(issue.message)])),
      );
      setFailure("Some fields need another look; nothing was saved.");
      return;
    }
    startSaving(async () => {
      const result = await (saved
        ? change({ ...read.data, id: saved.id, version: saved.version })
        : create({ ...read.data, id: id.current })
      ).catch(() => null);
      if (result?.ok) {
        showMessage({ text: `“${result.data.name}” saved.` });
        router.push("/shop/styles" as Route);
        return;
      }
      setErrors(result?.error.fields ?? {});
      setFailure(
        result?.error.message ?? "The server did not answer. Your weights are still here: try again.",
      );
    });
  }

  return (
    <div className="grid gap-6">
      {failure ? (
        <p role="alert" className="flex items-start gap-1.5 font-semibold text-rust">
          <Sign name="attention" className="mt-[3px]" /> {failure}
        </p>
      ) : null}
      <StylePreview
        style={preview}
        before={{ style, name: saved ? "what was saved" : beginsWith }}
        instruments={instruments}
      />
      <div className="grid gap-4 sm:grid-cols-3">
        <TextInput
          label="Name"
          value={draft.name}
          readOnly={!canChange}
          onChange={(event) => edit({ name: event.target.value })}
          {...(errors.name ? { error: errors.name } : {})}
        />
        <NumberInput
          label="Smoothness"
          help="0 follows every string; 100 hardly any."
          value={draft.smoothness}
          readOnly={!canChange}
          onChange={(event) => edit({ smoothness: event.target.value })}
          {...(errors.smoothness ? { error: errors.smoothness } : {})}
        />
        <NumberInput
          label="Enough when within"
          unit="± cents"
          value={draft.toleranceCents}
          readOnly={!canChange}
          onChange={(event) => edit({ toleranceCents: event.target.value })}
          {...(errors.toleranceCents ? { error: errors.toleranceCents } : {})}
        />
      </div>
      <WeightsTable
        rules={draft.rules}
        errors={errors}
        readOnly={!canChange}
        onWeight={(index, register, text) =>
          edit({
            rules: draft.rules.map((entry, place) =>
              place === index ? { ...entry, weights: { ...entry.weights, [register]: text } } : entry,
            ),
          })
        }
        onRemove={(index) => edit({ rules: draft.rules.filter((_, place) => place !== index) })}
      />
      {errors.intervals ? <p className="text-rust">{errors.intervals}</p> : null}
      {canChange ? (
        <div className="flex flex-wrap items-end justify-between gap-4">
          <Select
            label="Add an interval"
            value=""
            placeholder="Choose"
            className="w-full sm:w-72"
            options={open.map((interval) => ({
              value: ruleKey(interval),
              label: intervalWords[interval.name] ?? interval.name,
            }))}
            onChange={(event) => {
              const rule = newRule(event.target.value);
              if (rule) edit({ rules: [...draft.rules, draftRule(rule)] });
            }}
          />
          <Button kind="primary" busy={pending} busyLabel="Saving" onClick={save}>
            Save style
          </Button>
        </div>
      ) : (
        <p className="text-ink-soft">An owner changes the house styles.</p>
      )}
    </div>
  );
}

/** The schema's own words for a missing number are a programmer's. */
function wordsFor(message: string): string {
  return message.startsWith("Invalid input") ? "Not a number. Write 0.5." : message;
}
