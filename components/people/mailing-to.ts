import type { ActionResult } from "@/lib/doors/action-result";

/** An action that mails something, and says where to look for it. */
export type MailingTo = (input: unknown) => Promise<ActionResult<{ email: string }>>;
