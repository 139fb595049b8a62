import type { ReactNode } from "react";

export function Kbd({ children }: { children: ReactNode }) {
  return (
    <kbd className="inline-flex items-center self-center rounded-sm border border-edge bg-sheet px-[5px] font-sans text-12 font-medium text-ink-soft">
      {children}
    </kbd>
  );
}
