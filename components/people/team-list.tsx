"use client";

import type { ActionResult } from "@/lib/doors/action-result";
import type { MemberRecord } from "@/lib/people/schema";
import { TeamRow } from "./team-row";

export type ShownMember = MemberRecord & { sinceWords: string };
export type MemberAction = (input: unknown) => Promise<ActionResult<MemberRecord>>;

export function TeamList({
  members,
  ...rest
}: {
  members: readonly ShownMember[];
  ownId: string;
  canChange: boolean;
  changeAction: MemberAction;
  endAction: MemberAction;
}) {
  return (
    <ul className="border-t border-hairline">
      {members.map((member) => (
        <TeamRow key={`${member.id} ${member.version}`} member={member} {...rest} />
      ))}
    </ul>
  );
}
