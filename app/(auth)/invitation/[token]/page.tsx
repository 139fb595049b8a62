import type { Metadata } from "next";
import { AcceptAsNewForm } from "@/components/people/accept-as-new-form";
import { AcceptButton } from "@/components/people/accept-button";
import { SignOutButton } from "@/components/people/sign-out-button";
import { AuthPage } from "@/components/shell/auth-page";
import { AppLink } from "@/components/ui/app-link";
import { LinkButton } from "@/components/ui/button";
import { ErrorState } from "@/components/ui/states";
import { currentPerson } from "@/lib/auth/actor";
import { invitationBehind } from "@/lib/people/invitations/service";
import { roleInvited } from "@/lib/people/role-words";
import { signOutAction } from "../../sign-out/actions";
import { acceptAction, acceptAsNewAction } from "./actions";

export const metadata: Metadata = { title: "Invitation" };

/** Opening the link changes nothing: programs that look through mail open links too. A button accepts. */
export default async function InvitationPage({ params }: { params: Promise<{ token: string }> }) {
  const { token } = await params;
  const [invitation, person] = await Promise.all([invitationBehind(token), currentPerson()]);
  const toSignIn = (
    <AppLink href="/sign-in" className="link link-alone">
      Go to sign-in
    </AppLink>
  );
  if (!invitation) {
    return (
      <AuthPage title="Invitation" footer={toSignIn}>
        <ErrorState title="There is no such invitation">
          Copy all of the link from the mail. If the shop sent it again, only the newest one works.
        </ErrorState>
      </AuthPage>
    );
  }
  const title = `Join ${invitation.shopName}`;
  if (invitation.words) {
    return (
      <AuthPage title={title} footer={toSignIn}>
        <ErrorState title={invitation.words} />
      </AuthPage>
    );
  }
  const subtitle = `${invitation.invitedBy} invites you ${roleInvited[invitation.role]}.`;
  const here = `/invitation/${encodeURIComponent(token)}`;
  const isTheirs = person?.email.toLowerCase() === invitation.email.toLowerCase();

  if (person && !isTheirs) {
    return (
      <AuthPage title={title} subtitle={subtitle}>
        <div className="grid gap-4 text-16">
          <p className="break-words">
            The invitation was sent to <b className="font-semibold">{invitation.email}</b>, and you are signed
            in as {person.email}.
          </p>
          <SignOutButton action={signOutAction} next={here} size="big">
            Sign out to accept it
          </SignOutButton>
        </div>
      </AuthPage>
    );
  }
  if (person) {
    return (
      <AuthPage title={title} subtitle={subtitle} footer={`Signed in as ${person.email}`}>
        <AcceptButton action={acceptAction} token={token} />
      </AuthPage>
    );
  }
  if (invitation.addressKnown) {
    return (
      <AuthPage title={title} subtitle={subtitle}>
        <div className="grid gap-4 text-16">
          <p className="break-words">
            <b className="font-semibold">{invitation.email}</b> has a sign-in already. Sign in with it; this
            page then comes back.
          </p>
          <LinkButton kind="primary" size="big" href={`/sign-in?next=${encodeURIComponent(here)}`}>
            Sign in to accept
          </LinkButton>
        </div>
      </AuthPage>
    );
  }
  return (
    <AuthPage title={title} subtitle={subtitle}>
      <AcceptAsNewForm action={acceptAsNewAction} token={token} email={invitation.email} />
    </AuthPage>
  );
}
