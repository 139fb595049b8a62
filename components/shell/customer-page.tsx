import type { ReactNode } from "react";

/** Pages a customer opens from a mail: the shop's name first, one thing asked, Agraffe only at the foot. */
export function CustomerPage({
  shop,
  children,
}: {
  shop: { name: string; line?: string; contact?: ReactNode; logo?: ReactNode };
  children: ReactNode;
}) {
  return (
    <div className="min-h-dvh bg-sheet">
      <div className="mx-auto flex min-h-dvh max-w-140 flex-col px-5 pt-6 pb-8">
        <header className="flex items-baseline justify-between gap-4 border-b border-edge pb-3">
          <span className="flex items-center gap-3">
            {shop.logo}
            <span className="serif text-19">{shop.name}</span>
          </span>
          {shop.line ? <span className="lab text-right">{shop.line}</span> : null}
        </header>
        <main id="work" className="pt-6 text-16 [&>h1]:mb-1">
          {children}
        </main>
        <footer className="lab mt-auto flex justify-between gap-4 pt-6">
          <span>{shop.contact}</span>
          <span>Kept with Agraffe</span>
        </footer>
      </div>
    </div>
  );
}
