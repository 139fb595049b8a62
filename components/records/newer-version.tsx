"use client";

import { Button } from "@/components/ui/button";
import { Sign } from "@/components/ui/sign";

export type Difference = { label: string; saved: string; mine: string };

/** The fields in which two versions of a record differ, in words. */
export function differences<Shown extends Record<string, string>>(
  labels: Record<keyof Shown & string, string>,
  saved: Shown,
  mine: Shown,
): Difference[] {
  return Object.entries<string>(labels).flatMap(([field, label]) => {
    const [theirs = "", ours = ""] = [saved[field], mine[field]];
    return theirs === ours ? [] : [{ label, saved: theirs, mine: ours }];
  });
}

/** Somebody saved meanwhile: both versions side by side, and a choice. Nothing that was typed is lost. */
export function NewerVersion({
  what,
  differing,
  onKeepMine,
  onTakeSaved,
}: {
  what: string;
  differing: readonly Difference[];
  onKeepMine: () => void;
  onTakeSaved: () => void;
}) {
  return (
    <section aria-label="Two versions" className="border-l-3 border-brass! bg-brass-wash py-3 pr-3 pl-4">
      <p className="flex items-start gap-1.5 font-semibold">
        <Sign name="half" className="mt-[3px] text-brass" />
        Somebody saved this {what} while you were writing
      </p>
      {differing.length > 0 ? (
        <div className="mt-2 overflow-x-auto">
          <table className="w-full text-left">
            <thead>
              <tr className="lab">
                <th className="py-1 pr-4 font-normal">Field</th>
                <th className="py-1 pr-4 font-normal">Saved meanwhile</th>
                <th className="py-1 font-normal">Yours</th>
              </tr>
            </thead>
            <tbody>
              {differing.map(({ label, saved, mine }) => (
                <tr key={label} className="border-t border-hairline align-top">
                  <th className="py-1 pr-4 font-normal text-ink-soft">{label}</th>
                  <td className="py-1 pr-4 break-words">{saved || "empty"}</td>
                  <td className="py-1 font-medium break-words">{mine || "empty"}</td>
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      ) : (
        <p className="mt-1">Both say the same. Save again, and yours is the newest.</p>
      )}
      <div className="mt-3 flex flex-wrap gap-2">
        <Button size="small" onClick={onTakeSaved}>
          Take the saved one
        </Button>
        <Button size="small" onClick={onKeepMine}>
          Save mine over it
        </Button>
      </div>
    </section>
  );
}
