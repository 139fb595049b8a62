/** Stands on everything the demo shop shows as a measurement: these figures were invented. */
export function DemoBadge() {
  return (
    <span className="inline-block justify-self-start rounded-sm border border-hairline px-1.5 py-px text-12 whitespace-nowrap text-ink-soft">
      Demo data
    </span>
  );
}
