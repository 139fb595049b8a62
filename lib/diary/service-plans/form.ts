import { z } from "zod";
import { isDay } from "@/lib/dates";
import { versionOrNone } from "@/lib/version";
import { timeOfMinute } from "@/lib/wall-time";
import { rhythm, type ServicePlanInput, type ServicePlanRecord, servicePlanInput } from "./schema";

const blankOr = (is: (text: string) => boolean, message: string) =>
  z.string().refine((text) => text === "" || is(text), message);
const clock = blankOr((text) => minutesOf(text) !== null, "Write a time like 09:30.");
const dayText = blankOr(isDay, "Choose a day of the calendar.");
/** Checked only where the rhythm asks for it, so anything may stand in the field meanwhile. */
const number = z.unknown();

/** What the form of a service plan holds: flat, with every kind of rhythm side by side. */
export const servicePlanForm = z
  .object({
    instrumentId: z.uuid(),
    version: versionOrNone,
    kind: z.enum(["interval", "months", "events"]),
    every: number,
    unit: z.enum(["week", "month"]),
    months: z.array(z.string()),
    daysBefore: number,
    servedBefore: dayText,
    rests: z.boolean(),
    restsUntil: dayText,
    technicianId: z.union([z.literal(""), z.uuid()]),
    weekdays: z.array(z.string()),
    hoursFrom: clock,
    hoursUntil: clock,
    work: servicePlanInput.shape.work,
    workMinutes: servicePlanInput.shape.workMinutes,
  })
  .superRefine((form, context) => {
    const fault = (path: string, message: string) =>
      context.addIssue({ code: "custom", path: [path], message });
    for (const { path, message } of rhythm.safeParse(rhythmIn(form)).error?.issues ?? []) {
      fault(String(path[0] ?? "kind"), message);
    }
    const [from, until] = [minutesOf(form.hoursFrom), minutesOf(form.hoursUntil)];
    if ((from === null) !== (until === null)) {
      fault(from === null ? "hoursFrom" : "hoursUntil", "Give both hours, or neither.");
    }
    if (from !== null && until !== null && from >= until)
      fault("hoursUntil", "The hours end before they begin.");
  });

export type ServicePlanForm = z.output<typeof servicePlanForm>;

function rhythmIn({
  kind,
  every,
  unit,
  months,
  daysBefore,
}: Pick<ServicePlanForm, "kind" | "every" | "unit" | "months" | "daysBefore">): unknown {
  if (kind === "interval") return { kind, every, unit };
  return kind === "months" ? { kind, months: months.map(Number) } : { kind, daysBefore };
}

/** The form as the service takes it. */
export function planIn(form: ServicePlanForm): ServicePlanInput {
  const from = minutesOf(form.hoursFrom);
  const until = minutesOf(form.hoursUntil);
  return servicePlanInput.parse({
    version: form.version,
    rhythm: rhythmIn(form),
    servedBefore: form.servedBefore || null,
    rests: form.rests,
    restsUntil: form.restsUntil || null,
    technicianId: form.technicianId || null,
    weekdays: form.weekdays.map(Number),
    hours: from !== null && until !== null ? { from, until } : null,
    work: form.work,
    workMinutes: form.workMinutes,
  });
}

/** The form as it opens: on the plan there is, or on every six months, the commonest (common practice, no source). */
export function formOf(instrumentId: string, plan: ServicePlanRecord | null): ServicePlanForm {
  const every = plan?.rhythm.kind === "interval" ? plan.rhythm : { every: 6, unit: "month" as const };
  return {
    instrumentId,
    version: plan?.version ?? 0,
    kind: plan?.rhythm.kind ?? "interval",
    every: every.every,
    unit: every.unit,
    months: plan?.rhythm.kind === "months" ? plan.rhythm.months.map(String) : [],
    daysBefore: plan?.rhythm.kind === "events" ? plan.rhythm.daysBefore : 2,
    servedBefore: plan?.servedBefore ?? "",
    rests: plan?.rests ?? false,
    restsUntil: plan?.restsUntil ?? "",
    technicianId: plan?.technicianId ?? "",
    weekdays: plan?.weekdays.map(String) ?? [],
    hoursFrom: plan?.hours ? timeOfMinute(plan.hours.from) : "",
    hoursUntil: plan?.hours ? timeOfMinute(plan.hours.until) : "",
    work: plan?.work ?? "Tuning",
    workMinutes: plan?.workMinutes ?? 90,
  };
}

function minutesOf(text: string): number | null {
  const [, hours, minutes] = /^([01]\d|2[0-3]):([0-5]\d)$/.exec(text) ?? [];
  return hours && minutes ? 60 * Number(hours) + Number(minutes) : null;
}
