import type { ReactNode } from "react";
import { cx } from "./class-names";

const line = { fill: "none", stroke: "currentColor", strokeWidth: 1.5 } as const;

const drawings = {
  tick: <path d="M2.5 7.5l3 3 6-7" {...line} strokeWidth={1.75} />,
  attention: (
    <>
      <path d="M7 1.5L13 12.5H1z" {...line} strokeLinejoin="round" />
      <path d="M7 5.5v3.2M7 10v1.2" {...line} />
    </>
  ),
  clock: (
    <>
      <circle cx="7" cy="7" r="5.5" {...line} />
      <path d="M7 4v3.2l2 1.6" {...line} />
    </>
  ),
  half: (
    <>
      <circle cx="7" cy="7" r="5" {...line} />
      <path d="M7 2a5 5 0 0 1 0 10z" fill="currentColor" />
    </>
  ),
  dashed: <circle cx="7" cy="7" r="5" {...line} strokeDasharray="2.2 2" />,
  ring: <circle cx="7" cy="7" r="5" {...line} />,
  phone: (
    <>
      <rect x="3.5" y="1" width="7" height="12" rx="1.5" {...line} />
      <path d="M6 10.8h2" {...line} strokeWidth={1.2} />
    </>
  ),
  back: <path d="M3 5.5h5.5a3 3 0 0 1 0 6H6M5.5 2.5l-3 3 3 3" {...line} />,
  cross: <path d="M3 3l8 8M11 3l-8 8" {...line} strokeWidth={1.75} />,
  bar: <path d="M2.5 7h9" {...line} strokeWidth={1.75} />,
  plus: <path d="M2 7h10M7 2v10" {...line} strokeWidth={1.75} />,
  find: (
    <>
      <circle cx="6" cy="6" r="4" {...line} />
      <path d="M9 9l3.500 3.500" {...line} />
    </>
  ),
  "arrow-right": <path d="M2 7h9.500M7.500 3l4 4-4 4" {...line} />,
  "arrow-left": <path d="M12 7H2.500M6.500 3l-4 4 4 4" {...line} />,
  "arrow-up": <path d="M7 12V2.500M3 6.500l4-4 4 4" {...line} />,
  "arrow-down": <path d="M7 2v9.500M3 7.500l4 4 4-4" {...line} />,
  "chevron-down": <path d="M3.500 5.500L7 9l3.500-3.500" {...line} />,
  "chevron-up": <path d="M3.500 8.500L7 5l3.500 3.500" {...line} />,
  "chevron-left": <path d="M8.500 3.500L5 7l3.500 3.500" {...line} />,
  "chevron-right": <path d="M5.500 3.500L9 7l-3.500 3.500" {...line} />,
} satisfies Record<string, ReactNode>;

export type SignName = keyof typeof drawings;

/** A small drawn sign in the colour of its words. It never stands alone: give it words or a label. */
export function Sign({
  name,
  size = 14,
  label,
  className,
}: {
  name: SignName;
  size?: number;
  label?: string;
  className?: string;
}) {
  return (
    <svg
      width={size}
      height={size}
      viewBox="0 0 14 14"
      className={cx("inline-block shrink-0", className)}
      focusable="false"
      role={label ? "img" : undefined}
      aria-label={label}
      aria-hidden={label ? undefined : true}
    >
      {drawings[name]}
    </svg>
  );
}
