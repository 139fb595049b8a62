import { scopeOf } from "@/lib/auth/access";
import type { Actor } from "@/lib/auth/actor";
import { type Change, cameFrom, movesOf, type VisitState } from "./rules";
import type { VisitJob, VisitRecord, VisitRow } from "./schema";
import { shownTime } from "./times";

type Named = { id: string; name: string };

type SummaryRow = Parameters<typeof shownTime>[0] & {
  id: string;
  state: VisitState;
  siteId: string;
  siteName: string;
  street: string;
  city: string;
  customerName: string;
  version: number;
};

type JobRow = {
  id: string;
  instrumentId: string;
  maker: string;
  model: string;
  room: string;
  work: string;
  remarks: string | null;
};

type SheetRow = {
  id: string;
  jobId: string | null;
  stage: VisitJob["sheets"][number]["stage"];
  takenAt: Date;
  notes: number;
};

type FullRow = SummaryRow & {
  postalCode: string;
  accessNotes: string | null;
  customerId: string;
  customerPhone: string | null;
  notes: string | null;
  movedToId: string | null;
  movedFromId: string | null;
  updatedAt: Date;
};

export function instrumentName({ maker, model }: { maker: string; model: string }): string {
  return model ? `${maker} ${model}` : maker;
}

function isOwn(actor: Actor, technicians: readonly Named[]): boolean {
  return technicians.some(({ id }) => id === actor.memberId);
}

function mayChange(actor: Actor, technicians: readonly Named[]): boolean {
  const scope = scopeOf(actor.role, "visits.change");
  return scope === "all" || (scope === "own" && isOwn(actor, technicians));
}

/** A customer's own sign-in sees when, where, who and on what; not what the shop notes about it. */
export function visitRecordOf(
  actor: Actor,
  row: FullRow,
  parts: {
    technicians: Named[];
    jobs: JobRow[];
    sheets: SheetRow[];
    events: (Change & { at: Date; by: string | null; reason: string | null })[];
  },
): VisitRecord {
  const staff = actor.role !== "customer";
  const canChange = mayChange(actor, parts.technicians);
  return {
    id: row.id,
    state: row.state,
    ...shownTime(row),
    site: {
      id: row.siteId,
      name: row.siteName,
      street: row.street,
      postalCode: row.postalCode,
      city: row.city,
      accessNotes: staff ? row.accessNotes : null,
    },
    customer: { id: row.customerId, name: row.customerName, phone: row.customerPhone },
    technicians: parts.technicians,
    jobs: parts.jobs.map((job) => ({
      id: job.id,
      instrumentId: job.instrumentId,
      instrument: instrumentName(job),
      room: job.room,
      work: job.work,
      remarks: staff ? job.remarks : null,
      sheets: parts.sheets
        .filter(({ jobId }) => jobId === job.id)
        .map(({ id, stage, takenAt, notes }) => ({ id, stage, takenAt: takenAt.toISOString(), notes })),
    })),
    events: parts.events.map((event) => ({
      from: event.from,
      to: event.to,
      at: event.at.toISOString(),
      by: staff ? event.by : null,
      reason: staff ? event.reason : null,
    })),
    notes: staff ? row.notes : null,
    movedToId: row.movedToId,
    movedFromId: row.movedFromId,
    moves: canChange ? movesOf(actor.role, row.state, cameFrom(row.state, parts.events)) : [],
    canChange,
    updatedAt: row.updatedAt.toISOString(),
    version: row.version,
  };
}

const namedInstruments = 3;

export function visitRowOf(row: SummaryRow, technicians: Named[], jobs: readonly JobRow[]): VisitRow {
  return {
    id: row.id,
    state: row.state,
    ...shownTime(row),
    siteId: row.siteId,
    siteName: row.siteName,
    place: [row.street, row.city].filter(Boolean).join(", "),
    customerName: row.customerName,
    technicians,
    instruments: jobs
      .slice(0, namedInstruments)
      .map((job) => (job.room ? `${instrumentName(job)}, ${job.room}` : instrumentName(job))),
    jobs: jobs.length,
    version: row.version,
  };
}
