import "server-only";
import { z } from "zod";
import { env } from "@/lib/env";

const message = z.object({
  id: z.string(),
  to: z.array(z.string()),
  from: z.string(),
  subject: z.string(),
  text: z.string(),
  html: z.string(),
  receivedAt: z.iso.datetime(),
});

export type LocalMail = z.infer<typeof message>;

/** Only a start on this machine has a mailbox to look into. */
export function hasLocalMailbox(): boolean {
  return Boolean(env().LOCAL_SERVICES && env().MAILBOX_URL);
}

/** Mails that the local mailbox took instead of delivering them, newest first; null when it does not answer. */
export async function localMails(): Promise<LocalMail[] | null> {
  try {
    const response = await fetch(new URL("/messages", env().MAILBOX_URL), {
      cache: "no-store",
      signal: AbortSignal.timeout(3000),
    });
    return z.array(message).parse(await response.json());
  } catch {
    return null;
  }
}
