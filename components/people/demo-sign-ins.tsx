"use client";

import { DemoBadge } from "@/components/ui/demo-badge";

export type DemoPeople = {
  password: string;
  people: ReadonlyArray<{ email: string; label: string; shop: string }>;
};

/** One press fills the form with an invented person; the form's own button signs in. */
export function DemoSignIns({ demo, onChoose }: { demo: DemoPeople; onChoose: (email: string) => void }) {
  return (
    <section aria-label="Demo sign-ins" className="mt-6 border-t border-hairline pt-4">
      <p className="flex items-center justify-between gap-3">
        <span>
          Everybody's password: <span className="font-semibold whitespace-nowrap">{demo.password}</span>
        </span>
        <DemoBadge />
      </p>
      <ul className="mt-2 border-t border-hairline">
        {demo.people.map(({ email, label, shop }) => (
          <li key={email} className="border-b border-hairline">
            <button
              type="button"
              onClick={() => onChoose(email)}
              className="grid min-h-11 w-full grid-cols-[88px_minmax(0,1fr)] items-center gap-x-2 rounded-sm px-1 py-1 text-left hover:bg-cover"
            >
              <span className="font-medium">{label}</span>
              <span className="min-w-0">
                <span className="block truncate text-iron">{email}</span>
                <span className="lab block truncate">{shop}</span>
              </span>
            </button>
          </li>
        ))}
      </ul>
    </section>
  );
}
