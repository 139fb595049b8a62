import "server-only";
import nodemailer, { type Transporter } from "nodemailer";
import { env } from "@/lib/env";
import { AppError } from "@/lib/errors";
import { log } from "@/lib/log";

export type Mail = { to: string; subject: string; text: string; html: string; replyTo?: string };

let transport: Transporter | undefined;

function transporter(url: string): Transporter {
  // The local mailbox speaks no TLS; a real server is told to by its smtps: address or by STARTTLS.
  transport ??= nodemailer.createTransport(url, {
    from: env().MAIL_FROM,
  });
  return transport;
}

/** Whether mail can be sent at all: without SMTP_URL the features that need it say so. */
export function mailConfigured(): boolean {
  return env().SMTP_URL !== undefined;
}

export async function sendMail(mail: Mail): Promise<void> {
  const url = env().SMTP_URL;
  if (!url) {
    throw new AppError(
      "unavailable",
      "Mail is not set up on this server, so nothing was sent. Set SMTP_URL, or tell the person yourself.",
    );
  }
  const sent = await transporter(url).sendMail(mail);
  log().info({ messageId: sent.messageId, subject: mail.subject }, "mail sent");
}
