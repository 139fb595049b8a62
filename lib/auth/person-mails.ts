import "server-only";
import { countRequest, type Limit } from "@/lib/doors/rate-limit";
import { env } from "@/lib/env";
import { log } from "@/lib/log";
import { type Mail, sendMail } from "@/lib/mail/send";
import { addressKnownMail } from "@/lib/mail/templates/address-known";
import { confirmAddressMail } from "@/lib/mail/templates/confirm-address";
import { passwordResetMail } from "@/lib/mail/templates/password-reset";

const limit: Limit = { most: 5, seconds: 60 * 60 };

/**
 * Mails that anybody can cause by naming an address. Nothing is awaited, neither the count nor the mail: how
 * long the answer takes must not tell whether the address is known. Counted by the address mailed to, because
 * where a request comes from can be changed and whose mailbox is flooded cannot.
 */
function mailWithinLimit(kind: string, mail: Mail): void {
  const sent = async () => {
    const { allowed } = await countRequest(`${kind}:${mail.to.toLowerCase()}`, limit);
    if (allowed) await sendMail(mail);
  };
  sent().catch((error: unknown) => log().error({ err: error }, "mail was not sent"));
}

function link(path: string, token: string): string {
  return `${env().APP_URL}${path}?token=${encodeURIComponent(token)}`;
}

export function mailResetLink(person: { email: string; name: string }, token: string): void {
  mailWithinLimit(
    "reset-mail",
    passwordResetMail({ to: person.email, name: person.name, link: link("/reset-password", token) }),
  );
}

export function mailConfirmationLink(email: string, token: string): void {
  mailWithinLimit("confirm-mail", confirmAddressMail({ to: email, link: link("/confirm-address", token) }));
}

export function mailThatAddressIsKnown(email: string): void {
  const { APP_URL } = env();
  mailWithinLimit(
    "known-mail",
    addressKnownMail({ to: email, signIn: `${APP_URL}/sign-in`, reset: `${APP_URL}/forgot-password` }),
  );
}
