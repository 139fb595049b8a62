import { describe, expect, it } from "vitest";
import { newId } from "@/lib/ids";
import { formOf, planIn, type ServicePlanForm, servicePlanForm } from "./form";
import type { ServicePlanRecord } from "./schema";

const id = newId();
const form = (more: Partial<ServicePlanForm> = {}) => ({ ...formOf(id, null), ...more });
const faults = (more: Partial<ServicePlanForm>) =>
  servicePlanForm.safeParse(form(more)).error?.issues.map(({ path }) => path.join("."));

describe("the form of a service plan", () => {
  it("opens on half a year and is sound as it stands", () => {
    expect(planIn(servicePlanForm.parse(form()))).toMatchObject({
      rhythm: { kind: "interval", every: 6, unit: "month" },
      hours: null,
      technicianId: null,
      version: 0,
    });
  });

  it.each([
    [{ kind: "interval", every: 6, unit: "month" }],
    [{ kind: "months", months: [4, 10] }],
    [{ kind: "events", daysBefore: 2 }],
  ] as const)("gives back the plan it was opened on: %j", (rhythm) => {
    const plan: ServicePlanRecord = {
      instrumentId: id,
      rhythm: rhythm.kind === "months" ? { kind: "months", months: [...rhythm.months] } : rhythm,
      startsOn: "2026-01-10",
      servedBefore: "2025-11-02",
      rests: true,
      restsUntil: "2027-01-01",
      technicianId: newId(),
      technicianName: "Ines",
      weekdays: [2, 4],
      hours: { from: 540, until: 765 },
      work: "Tuning and pedals",
      workMinutes: 120,
      version: 3,
    };
    const { technicianName: _, instrumentId: _i, startsOn: _s, ...same } = plan;
    expect(planIn(servicePlanForm.parse(formOf(id, plan)))).toEqual(same);
  });

  it("says at its field what is missing, and only of the rhythm chosen", () => {
    expect(faults({ every: undefined })).toEqual(["every"]);
    expect(faults({ every: "six" })).toEqual(["every"]);
    expect(faults({ kind: "months", every: "six" })).toEqual(["months"]);
    expect(faults({ kind: "events", daysBefore: 61 })).toEqual(["daysBefore"]);
    expect(faults({ hoursFrom: "09:00" })).toEqual(["hoursUntil"]);
    expect(faults({ hoursFrom: "12:00", hoursUntil: "09:00" })).toEqual(["hoursUntil"]);
    expect(faults({ hoursFrom: "9" })).toEqual(["hoursFrom"]);
    expect(faults({ restsUntil: "2026-02-30" })).toEqual(["restsUntil"]);
  });
});
