import { letter } from "@/lib/mail/layout";

const works: Record<string, string> = {
  owner: "as an owner",
  office: "in the office",
  technician: "as a technician",
  customer: "to see your instruments and visits",
};

export function invitationMail(input: {
  to: string;
  shopName: string;
  invitedBy: string;
  role: string;
  link: string;
  days: number;
}) {
  return letter({
    to: input.to,
    subject: `${input.shopName} invites you to its service book`,
    heading: `Join ${input.shopName}`,
    paragraphs: [
      `${input.invitedBy} invites you ${works[input.role] ?? ""} at ${input.shopName}.`,
      `The link is yours alone and works for ${input.days} days.`,
    ],
    button: { label: "Accept the invitation", link: input.link },
    closing: `Sent by Agraffe for ${input.shopName}. If you do not know them, leave this mail alone.`,
  });
}
