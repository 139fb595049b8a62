"use server";

import { revalidatePath } from "next/cache";
import { defineAction } from "@/lib/doors/define-action";
import { invite, resendInvitation, revokeInvitation } from "@/lib/people/invitations/service";
import { invitationId, invitationInput, memberChange, memberEnd } from "@/lib/people/schema";
import { changeMember, endMembership } from "@/lib/people/service";

const showTeam = () => revalidatePath("/shop/team");

export const inviteAction = defineAction({
  name: "team.invite",
  permission: "team.change",
  input: invitationInput,
  limit: { most: 40, seconds: 600 },
  run: async (actor, input) => {
    const invitation = await invite(actor, input);
    showTeam();
    return invitation;
  },
});

export const resendInvitationAction = defineAction({
  name: "team.resend-invitation",
  permission: "team.change",
  input: invitationId,
  limit: { most: 20, seconds: 600 },
  run: async (actor, { id }) => {
    const invitation = await resendInvitation(actor, id);
    showTeam();
    return invitation;
  },
});

export const revokeInvitationAction = defineAction({
  name: "team.revoke-invitation",
  permission: "team.change",
  input: invitationId,
  run: async (actor, { id }) => {
    await revokeInvitation(actor, id);
    showTeam();
    return { id };
  },
});

export const changeMemberAction = defineAction({
  name: "team.change-member",
  permission: "team.change",
  input: memberChange,
  run: async (actor, change) => {
    const member = await changeMember(actor, change);
    showTeam();
    return member;
  },
});

export const endMembershipAction = defineAction({
  name: "team.end-membership",
  permission: "team.change",
  input: memberEnd,
  run: async (actor, input) => {
    const member = await endMembership(actor, input);
    showTeam();
    return member;
  },
});
