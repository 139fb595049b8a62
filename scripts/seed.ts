import { drizzle } from "drizzle-orm/postgres-js";
import postgres from "postgres";
import * as schema from "@/db/schema";
import { seedDemo } from "@/db/seed/seed";

/** Puts the demo shops into an empty database. With anything in it, does nothing. SEED_DAY fixes what "today" is. */
const url = process.env.DATABASE_URL;
if (!url) {
  console.error("seed needs DATABASE_URL, the owner's");
  process.exit(2);
}
const client = postgres(url, { max: 1, onnotice: () => {} });
try {
  const today = process.env.SEED_DAY ?? new Date().toISOString().slice(0, 10);
  const seeded = await drizzle(client, { schema }).transaction((tx) => seedDemo(tx, today));
  console.log(seeded ? "seeded the demo shops" : "not empty: nothing seeded");
} finally {
  await client.end({ timeout: 5 });
}
