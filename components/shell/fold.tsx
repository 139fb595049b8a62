"use client";

import { type ReactNode, useId, useState } from "react";
import { cx } from "../ui/class-names";
import { Sign } from "../ui/sign";

/** The left page as a header that opens, below the desk's width. On the desk it always lies open. */
export function Fold({ label, head, children }: { label: string; head: ReactNode; children: ReactNode }) {
  const [open, setOpen] = useState(false);
  const id = useId();
  return (
    <>
      <div className="flex items-start gap-2">
        <div className="min-w-0 flex-1">{head}</div>
        <button
          type="button"
          aria-expanded={open}
          aria-controls={id}
          onClick={() => setOpen(!open)}
          data-no-print
          className="-mt-1.5 -mr-2 flex h-11 shrink-0 items-center gap-3 rounded px-2 text-16 font-medium text-iron lg:hidden"
        >
          {label}
          <Sign name={open ? "chevron-up" : "chevron-down"} />
        </button>
      </div>
      <div
        id={id}
        className={cx(
          "mt-5 sm:max-lg:[&>*]:block! sm:max-lg:[&>*]:columns-2 sm:max-lg:[&>*]:gap-10 sm:max-lg:[&>*>*]:mb-6 sm:max-lg:[&>*>*]:break-inside-avoid",
          !open && "max-lg:hidden print:block!",
        )}
      >
        {children}
      </div>
    </>
  );
}
