import PostalMime, { type Email } from "postal-mime";
import { SMTPServer } from "smtp-server";

/** A mail server on loopback that keeps what it is sent. Start it before anything reads the environment. */
export async function startMailbox() {
  const mails: { to: string[]; mail: Email }[] = [];
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ["STARTTLS", "AUTH"],
    async onData(stream, session, done) {
      const parts: Buffer[] = [];
      for await (const part of stream) parts.push(Buffer.from(part));
      mails.push({
        to: session.envelope.rcptTo.map(({ address }) => address),
        mail: await PostalMime.parse(Buffer.concat(parts)),
      });
      done();
    },
  });
  await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
  const listening = server.server.address();
  if (listening === null || typeof listening === "string") throw new Error("The mailbox has no port");
  process.env.SMTP_URL = `smtp://127.0.0.1:${listening.port}?ignoreTLS=true`;

  const to = (address: string) => mails.filter((entry) => entry.to.includes(address));
  return {
    to,
    /** Mails sent in the background arrive a little later. */
    async next(address: string, after = 0): Promise<Email> {
      for (let tries = 0; tries < 200; tries++) {
        const found = to(address)[after];
        if (found) return found.mail;
        await new Promise((resolve) => setTimeout(resolve, 25));
      }
      throw new Error(`No mail came to ${address}`);
    },
    stop: () => new Promise<void>((resolve) => server.close(resolve)),
  };
}

export type Mailbox = Awaited<ReturnType<typeof startMailbox>>;

/** The token at the end of the link in a mail. */
export function linkToken(mail: Email): string {
  const found = /(?:token=|invitation\/)([\w%.-]+)/.exec(mail.text ?? "")?.[1];
  if (!found) throw new Error(`No link in: ${mail.text}`);
  return decodeURIComponent(found);
}
