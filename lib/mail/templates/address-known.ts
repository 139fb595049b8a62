import { letter } from "@/lib/mail/layout";

/** Says nothing of who asked: that may have been anybody. */
export function addressKnownMail(input: { to: string; signIn: string; reset: string }) {
  return letter({
    to: input.to,
    subject: "You have a sign-in for Agraffe already",
    heading: "You have a sign-in already",
    paragraphs: [
      "Somebody tried to sign up to Agraffe with this address, which signs in already. Nothing has changed.",
      `If it was you, sign in as before; another shop can be opened from there. If the password is forgotten, set a new one: ${input.reset}`,
      "If it was not you, leave this mail alone.",
    ],
    button: { label: "Sign in", link: input.signIn },
    closing: "Agraffe, the service book of a piano-tuning business.",
  });
}
