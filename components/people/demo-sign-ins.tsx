"use client";

import { DemoBadge } from "@/components/ui/demo-badge";

export type DemoPeople = {
  password: string;
  shops: ReadonlyArray<{ name: string; people: ReadonlyArray<{ email: string; label: string }> }>;
};

/** One press fills the form with an invented person; the form's own button signs in. */
export function DemoSignIns({ demo, onChoose }: { demo: DemoPeople; onChoose: (email: string) => void }) {
  return (
    <section aria-label="Demo sign-ins" className="mt-6 border-t border-hairline pt-4">
      <p className="flex items-center justify-between gap-3">
        <span>
          All with <span className="font-semibold whitespace-nowrap">{demo.password}</span>
        </span>
        <DemoBadge />
      </p>
      {demo.shops.map(({ name, people }) => (
        <div key={name} className="mt-3">
          <h2 className="lab font-sans! tracking-normal!">{name}</h2>
          <ul className="mt-1 border-t border-hairline">
            {people.map(({ email, label }) => (
              <li key={email} className="border-b border-hairline">
                <button
                  type="button"
                  onClick={() => onChoose(email)}
                  className="grid min-h-8 w-full grid-cols-[80px_minmax(0,1fr)] items-center gap-x-2 rounded-sm text-left hover:bg-cover touch:min-h-11"
                >
                  <span className="font-medium">{label}</span>
                  <span className="truncate text-iron">{email}</span>
                </button>
              </li>
            ))}
          </ul>
        </div>
      ))}
    </section>
  );
}
