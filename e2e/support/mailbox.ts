import { expect } from "@playwright/test";

type Mail = { id: string; to: string[]; subject: string; text: string };

async function mailsTo(address: string): Promise<Mail[]> {
  const { MAILBOX_URL } = process.env;
  if (!MAILBOX_URL) throw new Error("MAILBOX_URL is not set");
  const answer = await fetch(new URL(`/messages?to=${encodeURIComponent(address)}`, MAILBOX_URL));
  return (await answer.json()) as Mail[];
}

/** The link in the only mail to this address; mails sent in the background arrive a little later. */
export async function linkMailedTo(address: string, subject: RegExp): Promise<string> {
  await expect.poll(async () => (await mailsTo(address)).length, { message: `a mail to ${address}` }).toBe(1);
  const [mail] = await mailsTo(address);
  expect(mail?.subject).toMatch(subject);
  const link = /https?:\/\/\S+/.exec(mail?.text ?? "")?.[0];
  if (!link) throw new Error(`There is no link in: ${mail?.text}`);
  return link;
}
