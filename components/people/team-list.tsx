"use client";

import { type MemberAction, type ShownMember, TeamRow } from "./team-row";

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
