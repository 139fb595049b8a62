import { AppLink } from "@/components/ui/app-link";
import { Sign } from "@/components/ui/sign";
import type { InstrumentRow } from "@/lib/instruments/schema";

/** A customer's own instruments; each leads to what was found and done. */
export function CustomerInstruments({
  instruments,
  shopName,
}: {
  instruments: readonly Pick<InstrumentRow, "id" | "name" | "room" | "siteName" | "year">[];
  shopName: string;
}) {
  return (
    <section aria-labelledby="own-instruments" className="mt-10">
      <h2 id="own-instruments">{instruments.length === 1 ? "Your instrument" : "Your instruments"}</h2>
      {instruments.length === 0 ? (
        <p className="mt-2 text-ink-soft">
          No instrument is written down under your name yet. {shopName} adds it at the first visit.
        </p>
      ) : (
        <ul className="mt-2 border-t border-edge!">
          {instruments.map((instrument) => (
            <li
              key={instrument.id}
              className="relative flex min-h-14 items-center justify-between gap-4 border-b border-hairline py-2.5 hover:bg-cover"
            >
              <div className="min-w-0">
                <h3>
                  <AppLink
                    href={`/my/instruments/${instrument.id}`}
                    // The whole entry is the target, not only its name.
                    className="rounded-sm after:absolute after:inset-0 hover:underline"
                  >
                    {instrument.name}
                  </AppLink>
                </h3>
                <p className="text-14 text-ink-soft">
                  {[instrument.siteName, instrument.room, instrument.year ? `made in ${instrument.year}` : ""]
                    .filter(Boolean)
                    .join(", ")}
                </p>
              </div>
              <Sign name="chevron-right" className="text-ink-soft" />
            </li>
          ))}
        </ul>
      )}
    </section>
  );
}
