import { PageSection } from "@/components/shell/page-section";
import { Disclosure } from "@/components/ui/disclosure";
import { Facts } from "@/components/ui/facts";
import { showDay } from "@/lib/dates";
import type { ServicePlanRecord } from "@/lib/diary/service-plans/schema";
import { restWords, rhythmWords, weekdayName } from "@/lib/diary/words";
import { timeOfMinute } from "@/lib/wall-time";
import { ServicePlanForm } from "./service-plan-form";

/** What an instrument's record says of its next visits, and the form for those who may change it. */
export function ServicePlanSection({
  change,
  ...form
}: { change: boolean } & Parameters<typeof ServicePlanForm>[0]) {
  const { plan, locale } = form;
  return (
    <PageSection title="Service plan">
      {plan ? (
        <PlanFacts plan={plan} locale={locale} />
      ) : (
        <p className="text-ink-soft">None: it is never due.</p>
      )}
      {change ? (
        <Disclosure label={plan ? "Change the plan" : "Plan its service"} className="mt-2">
          {/* A saved plan comes back under its new version, and the form begins again from it. */}
          <ServicePlanForm key={plan?.version ?? 0} {...form} />
        </Disclosure>
      ) : null}
    </PageSection>
  );
}

function PlanFacts({ plan, locale }: { plan: ServicePlanRecord; locale: string }) {
  const days = plan.weekdays.map((day) => weekdayName(day, locale));
  const hours = plan.hours ? `${timeOfMinute(plan.hours.from)}–${timeOfMinute(plan.hours.until)}` : null;
  return (
    <Facts
      facts={[
        { name: "Due", value: rhythmWords(plan, locale) },
        plan.rests && { name: "Now", value: restWords(plan, locale) },
        { name: "Work", value: `${plan.work}, ${plan.workMinutes} minutes` },
        { name: "Technician", value: plan.technicianName ?? "anybody" },
        (days.length > 0 || hours !== null) && {
          name: "Prefers",
          value: [new Intl.ListFormat(locale, { type: "disjunction" }).format(days), hours]
            .filter(Boolean)
            .join(", "),
        },
        plan.servedBefore !== null && {
          name: "Served before",
          value: `${showDay(plan.servedBefore, locale)}, before this book`,
        },
      ]}
    />
  );
}
