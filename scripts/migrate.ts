import path from "node:path";
import { drizzle } from "drizzle-orm/postgres-js";
import { migrate } from "drizzle-orm/postgres-js/migrator";
import postgres from "postgres";

/**
 * Brings a database up to date as its owner: makes the two login roles, runs the migrations, and grants the
 * app role the tables that have row-level security, and only those: a table planted without a wall stays shut.
 */
const ownerUrl = process.env.DATABASE_URL;
const appUrl = process.env.APP_DATABASE_URL;
const authUrl = process.env.AUTH_DATABASE_URL;
if (!ownerUrl || !appUrl || !authUrl) {
  console.error("migrate needs DATABASE_URL (the owner), APP_DATABASE_URL and AUTH_DATABASE_URL");
  process.exit(2);
}

const sql = postgres(ownerUrl, { max: 1, onnotice: () => {} });

async function ensureLogin(url: string, expectedName: string) {
  const { username, password } = new URL(url);
  if (username !== expectedName)
    throw new Error(`The role in the URL must be ${expectedName}, not ${username}`);
  const [exists] = await sql`select 1 from pg_roles where rolname = ${username}`;
  const verb = exists ? "ALTER" : "CREATE";
  const [statement] = await sql<{ text: string }[]>`
    select format(${`${verb} ROLE %I LOGIN PASSWORD %L`}::text, ${username}::text, ${decodeURIComponent(password)}::text) as text`;
  if (statement) await sql.unsafe(statement.text);
}

try {
  // One migration at a time, whoever starts it.
  await sql`select pg_advisory_lock(728301)`;
  await ensureLogin(appUrl, "agraffe_app");
  await ensureLogin(authUrl, "agraffe_auth");
  await migrate(drizzle(sql), { migrationsFolder: path.join(import.meta.dirname, "..", "drizzle") });
  await sql.unsafe(`
    REVOKE ALL ON ALL TABLES IN SCHEMA public FROM PUBLIC, agraffe_app;
    GRANT USAGE ON SCHEMA public TO agraffe_app;
    GRANT USAGE ON SCHEMA auth TO agraffe_auth;
    GRANT SELECT, INSERT, UPDATE, DELETE ON ALL TABLES IN SCHEMA auth TO agraffe_auth;
    DO $$ DECLARE walled regclass; BEGIN
      FOR walled IN SELECT c.oid FROM pg_class c WHERE c.relnamespace = 'public'::regnamespace
        AND c.relkind = 'r' AND c.relrowsecurity
      LOOP EXECUTE format('GRANT SELECT, INSERT, UPDATE, DELETE ON %s TO agraffe_app', walled); END LOOP;
    END $$;`);
} finally {
  await sql.end({ timeout: 5 });
}
