import { AsyncLocalStorage } from "node:async_hooks";
import pino from "pino";
import { env } from "@/lib/env";

type RequestContext = { requestId: string; shopId?: string; personId?: string };

const requests = new AsyncLocalStorage<RequestContext>();

let logger: pino.Logger | undefined;

/** Structured log lines on standard output; every line inside a request carries its id. */
export function log(): pino.Logger {
  logger ??= pino({
    level: env().LOG_LEVEL,
    base: { app: "agraffe" },
    timestamp: pino.stdTimeFunctions.isoTime,
    redact: ["password", "token", "secret", "*.password", "*.token", "*.secret", "headers.cookie"],
  });
  const context = requests.getStore();
  return context ? logger.child(context) : logger;
}

export function withRequest<T>(context: RequestContext, run: () => Promise<T>): Promise<T> {
  return requests.run(context, run);
}

export function noteActor(ids: { shopId: string; personId: string }): void {
  const context = requests.getStore();
  if (context) Object.assign(context, ids);
}

export function currentRequestId(): string | undefined {
  return requests.getStore()?.requestId;
}
