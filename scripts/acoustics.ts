import { answer, describeVerb, verbs } from "@/lib/acoustics/door";

/**
 * The computation on the command line: one JSON document on standard input, one on standard output.
 * Exit 0, or 2 when the input is refused.
 */
async function readAll(): Promise<string> {
  const chunks: Buffer[] = [];
  for await (const chunk of process.stdin) chunks.push(Buffer.from(chunk));
  return Buffer.concat(chunks).toString("utf8");
}

function write(document: unknown, exitCode: number): void {
  process.exitCode = exitCode;
  process.stdout.write(`${JSON.stringify(document)}\n`);
}

const [verb = "help", topic] = process.argv.slice(2);
if (verb === "help") {
  if (topic === undefined) write({ verbs: Object.keys(verbs) }, 0);
  else {
    const schema = describeVerb(topic);
    if (schema === null) write(answer(topic, "").document, 2);
    else write(schema, 0);
  }
} else {
  const known = Object.hasOwn(verbs, verb);
  const { ok, document } = answer(verb, known ? await readAll() : "");
  write(document, ok ? 0 : 2);
}
