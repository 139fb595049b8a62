"use client";

import { useRouter } from "next/navigation";
import { useId, useState, useTransition } from "react";
import { CheckMark } from "@/components/forms/checkbox";
import { Button } from "@/components/ui/button";
import { ConfirmDialog } from "@/components/ui/dialog";
import { showMessage, toastWithUndo } from "@/components/ui/message-queue";
import { Sign } from "@/components/ui/sign";
import type { ActionResult } from "@/lib/doors/action-result";
import { roleWords } from "@/lib/people/role-words";
import type { MemberRecord } from "@/lib/people/schema";

export type ShownMember = MemberRecord & { sinceWords: string };
export type MemberAction = (input: unknown) => Promise<ActionResult<MemberRecord>>;

type Change = { role?: "owner" | "office" | "technician"; bookable?: boolean };

const staffRoles = ["owner", "office", "technician"] as const;

/** One member. A change shows at once and is put back with the reason when it is refused. */
export function TeamRow({
  member,
  ownId,
  canChange,
  changeAction,
  endAction,
}: {
  member: ShownMember;
  ownId: string;
  canChange: boolean;
  changeAction: MemberAction;
  endAction: MemberAction;
}) {
  const router = useRouter();
  const [shown, setShown] = useState({ role: member.role, bookable: member.bookable });
  const [asking, setAsking] = useState(false);
  const [busy, begin] = useTransition();
  const roleId = useId();
  const bookableId = useId();
  const isSelf = member.id === ownId;
  const isCustomer = member.role === "customer";

  async function send(change: Change, version: number): Promise<void> {
    const before = { role: member.role, bookable: member.bookable };
    setShown((now) => ({ ...now, ...change }));
    const result = await changeAction({ id: member.id, version, ...change }).catch(() => null);
    if (!result?.ok) {
      setShown(before);
      showMessage({
        kind: "attention",
        text: result?.error.message ?? "The server did not answer. Try again.",
      });
      if (result?.error.code === "stale") router.refresh();
      return;
    }
    const back: Change = {
      ...(change.role && before.role !== "customer" ? { role: before.role } : {}),
      ...(change.bookable === undefined ? {} : { bookable: before.bookable }),
    };
    toastWithUndo(said(member.name, change), async () => {
      const undone = await changeAction({ id: member.id, version: result.data.version, ...back });
      if (!undone.ok) throw new Error(undone.error.message);
    });
  }

  function end() {
    begin(async () => {
      const result = await endAction({ id: member.id, version: member.version }).catch(() => null);
      setAsking(false);
      if (result?.ok) showMessage({ text: `${member.name} no longer belongs to the shop.` });
      else
        showMessage({
          kind: "attention",
          text: result?.error.message ?? "The server did not answer. Try again.",
        });
    });
  }

  return (
    <li className="grid items-center gap-x-4 gap-y-1 border-b border-hairline py-2 sm:grid-cols-[minmax(0,1fr)_auto] lg:min-h-11">
      <div className="min-w-0">
        <div className="break-words">
          <span className="font-semibold">{member.name}</span>
          {isSelf ? <span className="lab ml-1.5">you</span> : null}
        </div>
        <div className="lab break-words">
          {isCustomer ? `for ${member.customerName}, ` : null}
          {member.email ? `${member.email}, ` : null}since {member.sinceWords}
        </div>
      </div>
      <div className="flex flex-wrap items-center gap-x-4 gap-y-1">
        {isCustomer ? null : canChange ? (
          <>
            <label htmlFor={roleId} className="sr-only">
              Role of {member.name}
            </label>
            <span className="relative inline-flex items-center">
              <select
                id={roleId}
                value={shown.role}
                onChange={(event) => {
                  const role = staffRoles.find((candidate) => candidate === event.target.value);
                  if (role) void send({ role }, member.version);
                }}
                className="h-9 w-34 appearance-none rounded border border-edge bg-sheet pr-8 pl-3 text-14 text-ink touch:h-11 touch:text-16"
              >
                {staffRoles.map((role) => (
                  <option key={role} value={role}>
                    {roleWords[role]}
                  </option>
                ))}
              </select>
              <Sign name="chevron-down" className="pointer-events-none absolute right-3 text-ink-soft" />
            </span>
            <label htmlFor={bookableId} className="flex min-h-9 items-center gap-2 touch:min-h-11">
              <CheckMark
                id={bookableId}
                checked={shown.bookable}
                onChange={(event) => void send({ bookable: event.target.checked }, member.version)}
              />
              Bookable<span className="sr-only">: {member.name}</span>
            </label>
          </>
        ) : (
          <span className="text-ink-soft">
            {roleWords[member.role]}
            {member.bookable ? ", bookable" : ""}
          </span>
        )}
        {canChange ? (
          <Button
            kind="quiet"
            onClick={() => setAsking(true)}
            aria-label={`End the membership of ${member.name}`}
          >
            End
          </Button>
        ) : null}
      </div>
      <ConfirmDialog
        open={asking}
        title={isSelf ? "Leave this shop?" : `End the membership of ${member.name}?`}
        keepLabel={isSelf ? "Stay" : "Keep the membership"}
        confirmLabel={isSelf ? "Leave the shop" : "End the membership"}
        busy={busy}
        onKeep={() => setAsking(false)}
        onConfirm={end}
      >
        {isSelf ? "You are" : `${member.name} is`} signed out of this shop at once. Visits and readings keep
        the name. Coming back takes a new invitation.
      </ConfirmDialog>
    </li>
  );
}

function said(name: string, change: Change): string {
  if (change.role) return `${name} has the role ${roleWords[change.role].toLowerCase()} now.`;
  return change.bookable ? `${name} can be booked for visits.` : `${name} is no longer offered for visits.`;
}
