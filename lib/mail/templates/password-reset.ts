import { letter } from "@/lib/mail/layout";

export function passwordResetMail(input: { to: string; name: string; link: string }) {
  return letter({
    to: input.to,
    subject: "Set a new password for Agraffe",
    heading: "Set a new password",
    paragraphs: [
      `Hello ${input.name}, somebody asked for a new password for this address. The link works once, for one hour.`,
      "If it was not you, leave this mail alone: nothing has changed.",
    ],
    button: { label: "Set a new password", link: input.link },
    closing: "Agraffe, the service book of a piano-tuning business.",
  });
}
