import { randomUUID } from "node:crypto";
import { createServer, type IncomingMessage, type ServerResponse } from "node:http";
import type { AddressInfo } from "node:net";
import type { Readable } from "node:stream";
import PostalMime from "postal-mime";
import { SMTPServer } from "smtp-server";

/**
 * Takes every mail of the local product and delivers none: an SMTP server to send to, and the mails over
 * HTTP for the mailbox page and the browser tests. On loopback only, in memory only.
 */
type Message = {
  id: string;
  /** The addresses the mail was really sent to, blind copies included. */
  to: string[];
  from: string;
  subject: string;
  text: string;
  html: string;
  receivedAt: string;
};

const host = "127.0.0.1";
const mostMessages = 500;
const largestMessage = 10 * 1024 * 1024;

/** Newest first. */
let messages: Message[] = [];

async function readAll(stream: Readable): Promise<Buffer> {
  const parts: Buffer[] = [];
  for await (const part of stream) parts.push(Buffer.from(part));
  return Buffer.concat(parts);
}

const smtp = new SMTPServer({
  authOptional: true,
  disabledCommands: ["STARTTLS", "AUTH"],
  // Who connects is known, and a machine without a name server would wait for the answer.
  disableReverseLookup: true,
  size: largestMessage,
  logger: false,
  async onData(stream, session, done) {
    try {
      const mail = await PostalMime.parse(await readAll(stream));
      if (stream.sizeExceeded) throw new Error("The mail is too large.");
      const { mailFrom, rcptTo } = session.envelope;
      const message: Message = {
        id: randomUUID(),
        to: rcptTo.map((recipient) => recipient.address.toLowerCase()),
        from: mail.from?.address ?? (mailFrom ? mailFrom.address : ""),
        subject: mail.subject ?? "",
        text: mail.text ?? "",
        html: mail.html ?? "",
        receivedAt: new Date().toISOString(),
      };
      messages = [message, ...messages].slice(0, mostMessages);
      done();
    } catch (error) {
      done(error instanceof Error ? error : new Error(String(error)));
    }
  },
});
smtp.on("error", (error) => console.error(error.message));

function answer(response: ServerResponse, status: number, body?: unknown) {
  response.writeHead(status, { "Content-Type": "application/json", "Cache-Control": "no-store" });
  response.end(body === undefined ? undefined : JSON.stringify(body));
}

/** A web page elsewhere could point its own name at loopback; the mails are only for this machine's. */
function isAskedLocally(request: IncomingMessage): boolean {
  return /^(127\.0\.0\.1|localhost)(:\d+)?$/.test(request.headers.host ?? "");
}

const http = createServer((request, response) => {
  if (!isAskedLocally(request)) return answer(response, 403, { error: "Only for this machine." });
  const url = new URL(request.url ?? "/", `http://${host}`);
  const [, collection, id, ...rest] = url.pathname.split("/");
  if (collection !== "messages" || rest.length > 0)
    return answer(response, 404, { error: "No such address." });

  if (request.method === "GET" && id) {
    const message = messages.find((candidate) => candidate.id === id);
    return message ? answer(response, 200, message) : answer(response, 404, { error: "No such mail." });
  }
  if (request.method === "GET") {
    const to = url.searchParams.get("to")?.toLowerCase();
    return answer(response, 200, to ? messages.filter((message) => message.to.includes(to)) : messages);
  }
  if (request.method === "DELETE" && !id) {
    messages = [];
    return answer(response, 204);
  }
  return answer(response, 405, { error: "Not something a mailbox does." });
});

smtp.listen(0, host, () => {
  http.listen(0, host, () => {
    const { port: smtpPort } = smtp.server.address() as AddressInfo;
    const { port: httpPort } = http.address() as AddressInfo;
    console.log(JSON.stringify({ smtpPort, httpPort }));
  });
});

for (const signal of ["SIGTERM", "SIGINT"] as const) process.once(signal, () => process.exit(0));
