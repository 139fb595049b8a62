import type { ReactNode } from "react";
import { BottomBar } from "./bottom-bar";
import { Spine, type SpineProps } from "./spine";

export type BookProps = Omit<SpineProps, "items"> & {
  items: ReadonlyArray<SpineProps["items"][number] & { phone?: boolean }>;
  children: ReactNode;
};

/** The frame around every staff page: spine, page, bottom bar. It stays while the pages change. */
export function Book({ children, ...way }: BookProps) {
  return (
    <div className="min-h-dvh lg:grid lg:grid-cols-[112px_minmax(0,1fr)] 2xl:bg-cover print:block">
      <SkipLink />
      <Spine {...way} />
      <div className="min-w-0 pb-[calc(var(--bar)+var(--strip))] print:pb-0">{children}</div>
      <BottomBar {...way} />
    </div>
  );
}

function SkipLink({ to = "#work" }: { to?: `#${string}` }) {
  return (
    <a
      href={to}
      className="fixed top-2 left-2 z-50 -translate-y-20 rounded bg-sheet px-4 py-2.5 font-semibold shadow-float focus:translate-y-0"
    >
      Skip to the page
    </a>
  );
}
