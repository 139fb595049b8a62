import { bigint, boolean, index, integer, pgSchema, text, uuid } from "drizzle-orm/pg-core";
import { instant, stamps } from "./columns";

/** People and their sign-ins. Only the auth role reaches this schema; the shops' role has no grant on it. */
export const authSchema = pgSchema("auth");

export const person = authSchema.table("person", {
  id: uuid("id").primaryKey(),
  name: text("name").notNull(),
  email: text("email").notNull().unique(),
  emailVerified: boolean("email_verified").notNull().default(false),
  image: text("image"),
  twoFactorEnabled: boolean("two_factor_enabled").notNull().default(false),
  ...stamps,
});

export const session = authSchema.table(
  "session",
  {
    id: uuid("id").primaryKey(),
    userId: uuid("person_id")
      .notNull()
      .references(() => person.id, { onDelete: "cascade" }),
    token: text("token").notNull().unique(),
    expiresAt: instant("expires_at").notNull(),
    ipAddress: text("ip_address"),
    userAgent: text("user_agent"),
    /** The shop this sign-in works in, where the person belongs to several. */
    shopId: uuid("shop_id"),
    ...stamps,
  },
  (table) => [index("session_person").on(table.userId)],
);

export const account = authSchema.table(
  "account",
  {
    id: uuid("id").primaryKey(),
    userId: uuid("person_id")
      .notNull()
      .references(() => person.id, { onDelete: "cascade" }),
    accountId: text("account_id").notNull(),
    providerId: text("provider_id").notNull(),
    accessToken: text("access_token"),
    refreshToken: text("refresh_token"),
    idToken: text("id_token"),
    accessTokenExpiresAt: instant("access_token_expires_at"),
    refreshTokenExpiresAt: instant("refresh_token_expires_at"),
    scope: text("scope"),
    password: text("password"),
    ...stamps,
  },
  (table) => [index("account_person").on(table.userId)],
);

export const verification = authSchema.table(
  "verification",
  {
    id: uuid("id").primaryKey(),
    identifier: text("identifier").notNull(),
    value: text("value").notNull(),
    expiresAt: instant("expires_at").notNull(),
    ...stamps,
  },
  (table) => [index("verification_identifier").on(table.identifier)],
);

export const twoFactor = authSchema.table(
  "two_factor",
  {
    id: uuid("id").primaryKey(),
    userId: uuid("person_id")
      .notNull()
      .references(() => person.id, { onDelete: "cascade" }),
    secret: text("secret").notNull(),
    backupCodes: text("backup_codes").notNull(),
    verified: boolean("verified").default(true),
    failedVerificationCount: integer("failed_verification_count").default(0),
    lockedUntil: instant("locked_until"),
  },
  (table) => [index("two_factor_person").on(table.userId)],
);

export const rateLimit = authSchema.table("rate_limit", {
  id: uuid("id").primaryKey(),
  key: text("key").notNull().unique(),
  count: integer("count").notNull(),
  lastRequest: bigint("last_request", { mode: "number" }).notNull(),
});
