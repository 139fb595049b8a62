import type { Metadata } from "next";
import { InvitationList } from "@/components/people/invitation-list";
import { InviteForm } from "@/components/people/invite-form";
import { TeamList } from "@/components/people/team-list";
import { PageSection } from "@/components/shell/page-section";
import { WorkHead } from "@/components/shell/spread";
import { EmptyState } from "@/components/ui/states";
import { may } from "@/lib/auth/access";
import { showDayOf } from "@/lib/dates";
import { mailConfigured } from "@/lib/mail/send";
import { staffActor } from "@/lib/pages/page-actor";
import { listInvitations } from "@/lib/people/invitations/service";
import { listTeam } from "@/lib/people/service";
import { getShop } from "@/lib/shop/service";
import {
  changeMemberAction,
  endMembershipAction,
  inviteAction,
  resendInvitationAction,
  revokeInvitationAction,
} from "./actions";

export const metadata: Metadata = { title: "Team" };

export default async function TeamPage() {
  const actor = await staffActor();
  const canChange = may(actor.role, "team.change");
  const [team, invitations, shop] = await Promise.all([
    listTeam(actor),
    canChange ? listInvitations(actor) : [],
    getShop(actor),
  ]);
  const day = (instant: string) => showDayOf(instant, shop.locale, shop.timeZone);
  const members = team.map((member) => ({ ...member, sinceWords: day(member.since) }));
  return (
    <>
      <WorkHead
        title="Team"
        summary={
          canChange
            ? "Who signs in to this shop. A change of role holds from their next page on."
            : "Who signs in to this shop. An owner changes roles and invites."
        }
      />
      <TeamList
        members={members.filter(({ role }) => role !== "customer")}
        ownId={actor.memberId}
        canChange={canChange}
        changeAction={changeMemberAction}
        endAction={endMembershipAction}
      />
      {canChange ? (
        <>
          <PageSection title="Invite somebody" className="mt-8 max-w-160">
            <InviteForm
              action={inviteAction}
              unavailable={
                mailConfigured() ? null : "This server sends no mail. Set SMTP_URL to invite people."
              }
            />
          </PageSection>
          <PageSection title="Open invitations" className="mt-8">
            {invitations.length === 0 ? (
              <EmptyState title="None is open">An invitation stands here until it is accepted.</EmptyState>
            ) : (
              <InvitationList
                invitations={invitations.map((invitation) => ({
                  ...invitation,
                  sentWords: day(invitation.sentAt),
                  expiresWords: day(invitation.expiresAt),
                }))}
                resendAction={resendInvitationAction}
                revokeAction={revokeInvitationAction}
              />
            )}
          </PageSection>
        </>
      ) : null}
      <PageSection title="Customers who sign in" className="mt-8">
        {members.some(({ role }) => role === "customer") ? (
          <TeamList
            members={members.filter(({ role }) => role === "customer")}
            ownId={actor.memberId}
            canChange={canChange}
            changeAction={changeMemberAction}
            endAction={endMembershipAction}
          />
        ) : (
          <EmptyState title="None yet">
            A customer who accepts an invitation sees the own instruments and visits, and nothing else.
          </EmptyState>
        )}
      </PageSection>
    </>
  );
}
