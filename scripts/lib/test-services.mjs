import { startMailbox } from "./services.mjs";
import { copyTemplate, makeTemplate, startThrowAwayCluster, templateDatabase } from "./throwaway-cluster.mjs";

/** What the product is told in every test, around one database of the throw-away cluster. */
export function testEnvironment({ urls, secrets, mailbox, appUrl, logLevel }) {
  return {
    APP_URL: appUrl,
    APP_DATABASE_URL: urls.app,
    AUTH_DATABASE_URL: urls.auth,
    AUTH_SECRET: secrets.authSecret,
    SMTP_URL: mailbox.smtpUrl,
    MAILBOX_URL: mailbox.mailboxUrl,
    LOCAL_SERVICES: "1",
    LOG_LEVEL: logLevel,
  };
}

/** A fresh, migrated, empty database, and the environment in which the integration tests find it. */
export async function integrationEnvironment({ throwAway, mailbox }) {
  const urls = await copyTemplate(throwAway, "agraffe_integration");
  return {
    ...testEnvironment({
      urls,
      mailbox,
      secrets: throwAway.secrets,
      appUrl: "http://127.0.0.1:3000",
      logLevel: "silent",
    }),
    TEST_DATABASE_URL: urls.owner,
    TEST_TEMPLATE_DATABASE: templateDatabase,
  };
}

/** The same for a test runner that was started by itself, without `npm test` around it. */
export async function startIntegrationServices() {
  const throwAway = await startThrowAwayCluster();
  await makeTemplate(throwAway);
  const mailbox = await startMailbox({ log: "mailbox-integration" });
  return {
    environment: await integrationEnvironment({ throwAway, mailbox }),
    async dispose() {
      await mailbox.child.stop();
      await throwAway.dispose();
    },
  };
}
