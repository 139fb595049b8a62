import type { ReactNode } from "react";

/** Long work on the string: the part done is brass, the stud stands where it is, the count says it. */
export function Progress({
  label,
  done,
  of,
  note,
}: {
  label: string;
  done: number;
  of: number;
  /** What happened on the way and what one may do meanwhile. */
  note?: ReactNode;
}) {
  const share = of > 0 ? Math.min(1, Math.max(0, done / of)) : 0;
  // The stud keeps inside the string's ends.
  const place = `${3 + share * 94}%`;
  return (
    <div>
      <div className="flex items-baseline justify-between gap-4">
        <span className="font-semibold">{label}</span>
        <span>
          {done} of {of}
        </span>
      </div>
      {/* Drawn as attributes rather than inline styles, which a strict policy refuses on the first paint. */}
      <svg
        role="progressbar"
        aria-label={label}
        aria-valuemin={0}
        aria-valuemax={of}
        aria-valuenow={done}
        aria-valuetext={`${done} of ${of}`}
        className="my-1.5 block h-[13px] w-full overflow-visible"
      >
        <line x1="0" x2="100%" y1="6.5" y2="6.5" className="stroke-edge" />
        <line x1="0" x2={place} y1="6.5" y2="6.5" strokeWidth="2" className="stroke-brass-fill" />
        <svg x={place} className="overflow-visible" aria-hidden="true" focusable="false">
          <rect x="-12" width="24" height="13" rx="4" className="fill-brass-fill" />
          <circle cx="0" cy="6.500" r="2.500" className="fill-sheet" />
        </svg>
      </svg>
      {note ? <p className="lab">{note}</p> : null}
    </div>
  );
}
