import type { ReactNode } from "react";

/**
 * The phone's next action, always under the thumb, above the bottom bar. Give it one big primary
 * button and at most one secondary; the same actions stand in the right page's heading on the desk.
 */
export function ActionStrip({ children }: { children: ReactNode }) {
  return (
    <div
      data-action-strip=""
      data-no-print
      className="fixed inset-x-0 bottom-(--bar) z-20 border-t border-hairline bg-paper px-4 py-3 sm:px-6 lg:hidden"
    >
      <div className="mx-auto flex max-w-160 gap-2 [&>*]:h-13 [&>*]:text-16 [&>*:last-child]:flex-1">
        {children}
      </div>
    </div>
  );
}
