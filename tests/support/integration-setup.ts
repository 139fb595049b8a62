import { startIntegrationServices } from "../../scripts/lib/test-services.mjs";

/**
 * `npm test` has the database ready and says where; `vitest --project integration` alone makes its own.
 * Either way the tests find the owner's address in TEST_DATABASE_URL, the product's in APP_DATABASE_URL and
 * AUTH_DATABASE_URL, and a migrated database to copy in TEST_TEMPLATE_DATABASE.
 */
export default async function setup() {
  if (process.env.TEST_DATABASE_URL) return undefined;
  const services = await startIntegrationServices();
  Object.assign(process.env, services.environment);
  return services.dispose;
}
