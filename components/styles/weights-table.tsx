"use client";

import { intervalWords } from "@/components/plans/beat-words";
import { cx } from "@/components/ui/class-names";
import { Sign } from "@/components/ui/sign";
import { BEATING_INTERVALS, REGISTERS, type RegisterRule } from "@/lib/acoustics";
import { ruleKey, type StyleDraft } from "./style-draft";

function ruleName(rule: RegisterRule): string {
  const known = BEATING_INTERVALS.find((interval) => ruleKey(interval) === ruleKey(rule));
  return (
    (known && intervalWords[known.name]) ??
    `${rule.lowerPartial}:${rule.upperPartial} over ${rule.semitones} semitones`
  );
}

/** Weights of each interval by register; the lower key decides the register. */
export function WeightsTable({
  rules,
  errors,
  readOnly,
  onWeight,
  onRemove,
}: {
  rules: StyleDraft["rules"];
  /** By path, as "intervals.2.weights.bass". */
  errors: Record<string, string>;
  readOnly: boolean;
  onWeight: (index: number, register: (typeof REGISTERS)[number], text: string) => void;
  onRemove: (index: number) => void;
}) {
  return (
    <section aria-label="Weights by register" className="overflow-x-auto">
      <table className="w-full min-w-140 border-collapse">
        <thead>
          <tr className="border-edge border-b text-left text-12 text-ink-soft">
            <th scope="col" className="py-2 pr-3 font-medium">
              Interval
            </th>
            {REGISTERS.map((register) => (
              <th key={register} scope="col" className="w-20 py-2 pr-2 text-right font-medium capitalize">
                {register}
              </th>
            ))}
            {readOnly ? null : <td className="w-11" />}
          </tr>
        </thead>
        <tbody>
          {rules.map(({ rule, weights }, index) => {
            const name = ruleName(rule);
            return (
              <tr key={ruleKey(rule)} className="border-hairline border-b">
                <th scope="row" className="h-11 pr-3 text-left font-normal">
                  {name}
                </th>
                {REGISTERS.map((register) => {
                  const error = errors[`intervals.${index}.weights.${register}`];
                  return (
                    <td key={register} className="pr-2 text-right">
                      <input
                        aria-label={`${name}, ${register}`}
                        aria-invalid={error ? true : undefined}
                        title={error}
                        inputMode="decimal"
                        autoComplete="off"
                        readOnly={readOnly}
                        value={weights[register]}
                        onChange={(event) => onWeight(index, register, event.target.value)}
                        className={cx(
                          "h-9 w-16 rounded border bg-sheet px-2 text-right text-16 touch:h-11",
                          error ? "border-rust" : "border-edge",
                        )}
                      />
                    </td>
                  );
                })}
                {readOnly ? null : (
                  <td>
                    <button
                      type="button"
                      aria-label={`Take out ${name}`}
                      onClick={() => onRemove(index)}
                      className="flex size-11 items-center justify-center rounded text-ink-soft hover:bg-cover"
                    >
                      <Sign name="cross" size={12} />
                    </button>
                  </td>
                )}
              </tr>
            );
          })}
        </tbody>
      </table>
    </section>
  );
}
