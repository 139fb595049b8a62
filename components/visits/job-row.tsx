import type { ReactNode } from "react";
import { SharpText } from "@/components/charts/note-name";
import { AppLink } from "@/components/ui/app-link";
import { cx } from "@/components/ui/class-names";
import { Sign, type SignName } from "@/components/ui/sign";

export type RowState = "done" | "half" | "open";

const looks: Record<RowState, { sign: SignName; colour: string; said: string }> = {
  done: { sign: "tick", colour: "text-spruce", said: "Done" },
  half: { sign: "half", colour: "text-brass", said: "Under way" },
  open: { sign: "dashed", colour: "text-ink-soft", said: "Not done yet" },
};

/** One step of a job, or one job: a sign, a name, words and a time; on the phone the words go below. */
export function JobRow({
  state,
  name,
  href,
  words,
  end,
  inHand = false,
}: {
  state: RowState;
  name: string;
  /** Makes the whole row a target. */
  href?: string | undefined;
  words: ReactNode;
  end?: ReactNode;
  inHand?: boolean;
}) {
  const { sign, colour, said } = looks[state];
  const label = <SharpText text={name} />;
  return (
    <li
      aria-current={inHand ? "step" : undefined}
      className={cx(
        "relative grid min-h-13 grid-cols-[24px_minmax(0,1fr)_auto] items-center gap-x-2 border-b border-hairline py-2",
        "lg:min-h-[50px] lg:grid-cols-[24px_112px_minmax(0,1fr)_auto] xl:grid-cols-[24px_176px_minmax(0,1fr)_auto]",
        inHand && "-mx-3 bg-brass-wash px-3 max-sm:-mx-4 max-sm:px-4",
        href && !inHand && "hover:bg-paper",
      )}
    >
      <span className={cx("flex", colour)}>
        <Sign name={sign} size={16} label={said} />
      </span>
      <span className={cx("min-w-0 max-lg:text-16", state === "open" ? "font-medium" : "font-semibold")}>
        {href ? (
          <AppLink href={href} className="rounded-sm after:absolute after:inset-0 hover:underline">
            {label}
          </AppLink>
        ) : (
          label
        )}
      </span>
      <span
        className={cx(
          "min-w-0 break-words max-lg:col-start-2 max-lg:col-end-4 max-lg:row-start-2 max-lg:text-16",
          state === "open" && "text-ink-soft",
        )}
      >
        {words}
      </span>
      {/* Above the row's own target. */}
      <span className="lab relative text-right whitespace-nowrap">{end}</span>
    </li>
  );
}
