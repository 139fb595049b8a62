import { z } from "zod";

/**
 * The one place that reads the environment. Parsed on first use, not on import,
 * because the build imports every module without any of these being set.
 */
const schema = z.object({
  NODE_ENV: z.enum(["development", "test", "production"]).default("development"),
  APP_URL: z.url().default("http://127.0.0.1:3000"),
  APP_DATABASE_URL: z.url(),
  AUTH_DATABASE_URL: z.url(),
  AUTH_SECRET: z.string().min(32),
  SMTP_URL: z.url().optional(),
  MAIL_FROM: z.string().default("Agraffe <no-reply@agraffe.example>"),
  /** Set by `npm start` only beside its own local cluster: shows the mailbox page and the demo sign-ins. */
  LOCAL_SERVICES: z.literal("1").optional(),
  MAILBOX_URL: z.url().optional(),
  LOG_LEVEL: z.enum(["fatal", "error", "warn", "info", "debug", "trace", "silent"]).default("info"),
  DATABASE_POOL: z.coerce.number().int().min(1).max(100).default(10),
  /** Proxies of your own in front of the server, whose entries in X-Forwarded-For are believed. */
  TRUSTED_PROXIES: z.coerce.number().int().min(0).max(5).default(0),
});

export type Env = z.infer<typeof schema>;

let parsed: Env | undefined;

export function env(): Env {
  if (!parsed) {
    const result = schema.safeParse(process.env);
    if (!result.success) {
      const lines = result.error.issues.map((issue) => `  ${issue.path.join(".")}: ${issue.message}`);
      throw new Error(`The environment is incomplete:\n${lines.join("\n")}`);
    }
    parsed = result.data;
  }
  return parsed;
}
