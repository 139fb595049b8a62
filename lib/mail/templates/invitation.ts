import type { Role } from "@/lib/auth/access";
import { letter } from "@/lib/mail/layout";
import { roleInvited } from "@/lib/people/role-words";

export function invitationMail(input: {
  to: string;
  shopName: string;
  invitedBy: string;
  role: Role;
  link: string;
  days: number;
}) {
  return letter({
    to: input.to,
    subject: `${input.shopName} invites you to its service book`,
    heading: `Join ${input.shopName}`,
    paragraphs: [
      `${input.invitedBy} invites you to ${input.shopName}, ${roleInvited[input.role]}.`,
      `The link is yours alone, for this address, and works once within ${input.days} days.`,
    ],
    button: { label: "Open the invitation", link: input.link },
    closing: `Sent by Agraffe for ${input.shopName}. If you do not know them, leave this mail alone.`,
  });
}
