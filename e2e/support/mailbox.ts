import { expect } from "@playwright/test";

type Mail = { id: string; to: string[]; subject: string; text: string };

async function mailsTo(address: string): Promise<Mail[]> {
  const { MAILBOX_URL } = process.env;
  if (!MAILBOX_URL) throw new Error("MAILBOX_URL is not set");
  const answer = await fetch(new URL(`/messages?to=${encodeURIComponent(address)}`, MAILBOX_URL));
  return (await answer.json()) as Mail[];
}

/** The link in the only such mail to this address; mails sent in the background arrive a little later. */
export async function linkMailedTo(address: string, subject: RegExp): Promise<string> {
  const found = async () => (await mailsTo(address)).filter((mail) => subject.test(mail.subject));
  await expect.poll(async () => (await found()).length, { message: `a mail to ${address}` }).toBe(1);
  const [mail] = await found();
  // The button's own link stands on a line by itself.
  const link = /^https?:\/\/\S+$/m.exec(mail?.text ?? "")?.[0];
  if (!link) throw new Error(`There is no link in: ${mail?.text}`);
  return link;
}
