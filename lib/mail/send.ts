import "server-only";
import nodemailer, { type Transporter } from "nodemailer";
import { env } from "@/lib/env";
import { AppError } from "@/lib/errors";
import { log } from "@/lib/log";

export type Mail = { to: string; subject: string; text: string; html: string; replyTo?: string };

let transport: Transporter | undefined;

function transporter(url: string): Transporter {
  // The local mailbox speaks no TLS; a real server is told to by its smtps: address or by STARTTLS.
  transport ??= nodemailer.createTransport(url, { from: env().MAIL_FROM });
  return transport;
}

/** Whether mail can be sent at all: without SMTP_URL the features that need it say so. */
export function mailConfigured(): boolean {
  return env().SMTP_URL !== undefined;
}

export function requireMail(): void {
  if (mailConfigured()) return;
  throw new AppError(
    "unavailable",
    "Mail is not set up on this server, so nothing was sent. Set SMTP_URL, or tell the person yourself.",
  );
}

/** One line of a header: what breaks the line would begin a header of its own. */
export function headerLine(text: string): string {
  return text.replace(/[\p{Cc}\p{Zl}\p{Zp}]+/gu, " ").trim();
}

/** Exactly one plain address, as an object, so that commas and brackets in it name nobody else. */
export function mailAddress(address: string): { name: string; address: string } {
  const plain = address.trim();
  if (!/^[^\s@<>,;:"()[\]\\]+@[^\s@<>,;:"()[\]\\]+$/u.test(plain)) {
    throw new AppError("invalid", "This is not an e-mail address that mail can be sent to.");
  }
  return { name: "", address: plain };
}

export async function sendMail(mail: Mail): Promise<void> {
  requireMail();
  const sent = await transporter(env().SMTP_URL ?? "").sendMail({
    ...mail,
    to: mailAddress(mail.to),
    replyTo: mail.replyTo === undefined ? undefined : mailAddress(mail.replyTo),
    subject: headerLine(mail.subject),
  });
  log().info({ messageId: sent.messageId, subject: headerLine(mail.subject) }, "mail sent");
}
