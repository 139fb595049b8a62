import type { ReactNode } from "react";
import { GreatMark, WordMark } from "./mark";

/** Sign-in, sign-up, reset and invitations: the mark at full height on the cover, the form on the sheet. */
export function AuthPage({
  title,
  subtitle,
  children,
  footer,
}: {
  title: ReactNode;
  subtitle?: ReactNode;
  children: ReactNode;
  /** Where else one may want to go, under a hairline. */
  footer?: ReactNode;
}) {
  return (
    <div className="min-h-dvh bg-sheet lg:grid lg:grid-cols-[minmax(0,1fr)_minmax(0,1fr)]">
      <div className="sticky top-0 hidden h-dvh border-r border-edge bg-cover lg:block" aria-hidden="true">
        <GreatMark />
      </div>
      <main className="flex min-h-dvh justify-center px-4 pt-12 pb-8 lg:items-center lg:py-8">
        <div className="w-full max-w-[344px]">
          <WordMark className="mb-12 max-lg:mb-10" />
          <h1>{title}</h1>
          {subtitle ? <p className="mt-1 text-16 text-ink-soft">{subtitle}</p> : null}
          <div className="mt-7">{children}</div>
          {footer ? <div className="mt-6 border-t border-hairline pt-5 text-ink-soft">{footer}</div> : null}
        </div>
      </main>
    </div>
  );
}
