import assert from "node:assert/strict";
import { after, before, test } from "node:test";
import nodemailer from "nodemailer";
import { startMailbox } from "../../scripts/lib/services.mjs";

let mailbox;
let transport;

before(async () => {
  mailbox = await startMailbox({ log: "mailbox-scripts" });
  transport = nodemailer.createTransport(
    `${mailbox.smtpUrl}?ignoreTLS=true&pool=true&maxConnections=1&maxMessages=10000`,
  );
});
after(async () => {
  transport.close();
  await mailbox.child.stop();
});

const read = async (path) => {
  const answer = await fetch(`${mailbox.mailboxUrl}${path}`);
  return { status: answer.status, body: answer.status === 204 ? undefined : await answer.json() };
};

function send(to, subject, more = {}) {
  return transport.sendMail({ from: "Larch & Wren <shop@larchandwren.example>", to, subject, ...more });
}

test("a mail is there as it was sent: accents, long lines and both bodies", async () => {
  const text = `Klavierstimmung für Frau Bähr: ${"very long line ".repeat(30)}\nhttps://agraffe.example/answer?token=a=b`;
  await send("Frau.Baehr@Example.ORG", "Ihr Termin: 14. März – bestätigt", { text, html: "<p>für</p>" });
  const { body } = await read("/messages?to=frau.baehr@example.org");
  assert.equal(body.length, 1);
  const [mail] = body;
  assert.equal(mail.subject, "Ihr Termin: 14. März – bestätigt");
  assert.equal(mail.text.trim(), text);
  assert.match(mail.html, /<p>für<\/p>/);
  assert.deepEqual(mail.to, ["frau.baehr@example.org"]);
  assert.equal(mail.from, "shop@larchandwren.example");
  assert.ok(Math.abs(Date.now() - Date.parse(mail.receivedAt)) < 60_000);
  assert.deepEqual((await read(`/messages/${mail.id}`)).body, mail);
  assert.equal((await read("/messages/none")).status, 404);
});

test("the newest mail is first, at most 500 are kept, and all can be thrown away", async () => {
  for (let n = 1; n <= 503; n += 1) await send("many@example.org", `number ${n}`, { text: "x" });
  const { body } = await read("/messages");
  assert.equal(body.length, 500);
  assert.equal(body[0].subject, "number 503");
  assert.equal(body.at(-1).subject, "number 4");
  const gone = await fetch(`${mailbox.mailboxUrl}/messages`, { method: "DELETE" });
  assert.equal(gone.status, 204);
  assert.deepEqual((await read("/messages")).body, []);
});

test("another name that leads to loopback gets no mails", async () => {
  const { default: http } = await import("node:http");
  const status = await new Promise((resolve) => {
    http.get(`${mailbox.mailboxUrl}/messages`, { headers: { Host: "elsewhere.example" } }, (answer) => {
      answer.resume();
      resolve(answer.statusCode);
    });
  });
  assert.equal(status, 403);
});
