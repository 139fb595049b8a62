import { NextAction, NextActionStrip } from "@/components/shell/next-action";
import { WorkHead } from "@/components/shell/spread";
import { type FirstRecords, firstStep } from "@/lib/visits/rules";
import { JobRow, type RowState } from "./job-row";

/** A book without anything to visit yet: its first customer, site and instrument, the next one to be done in hand. */
export function FirstSteps({ records, mayAdd }: { records: FirstRecords; mayAdd: boolean }) {
  const next = firstStep(records);
  const steps = [
    {
      key: "customer",
      name: "Customer",
      words: "A person or an organisation whose instruments you look after",
      label: "Add your first customer",
      href: "/customers/new",
      done: records.customerId !== null,
    },
    {
      key: "site",
      name: "Site",
      words: "The address where the instruments stand",
      label: "Add its site",
      href: records.customerId ? `/sites/new?customer=${records.customerId}` : "/sites/new",
      done: records.siteId !== null,
    },
    {
      key: "instrument",
      name: "Instrument",
      words: "Maker, model and compass; readings and visits hang on it",
      label: "Add its first instrument",
      href: records.siteId ? `/instruments/new?site=${records.siteId}` : "/instruments/new",
      done: records.instruments,
    },
  ];
  const step = steps.find(({ key }) => key === next);
  if (!step) return null;
  const state = (one: (typeof steps)[number]): RowState => (one.done ? "done" : "open");
  return (
    <>
      <WorkHead
        title="Begin the book"
        summary={
          mayAdd
            ? "Three things, and the first visit can be booked."
            : "The office adds the first customer, site and instrument; then visits can be booked."
        }
        actions={mayAdd ? <NextAction href={step.href} label={step.label} /> : null}
      />
      <ol aria-label="First steps" className="border-t border-edge!">
        {steps.map((one) => (
          <JobRow
            key={one.key}
            state={state(one)}
            name={one.name}
            words={one.words}
            inHand={mayAdd && one === step}
          />
        ))}
      </ol>
      {mayAdd ? <NextActionStrip href={step.href} label={step.label} /> : null}
    </>
  );
}
