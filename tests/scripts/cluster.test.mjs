import assert from "node:assert/strict";
import fs from "node:fs";
import net from "node:net";
import path from "node:path";
import { after, before, test } from "node:test";
import { startCluster } from "../../scripts/lib/postgres-cluster.mjs";
import { databaseUser } from "../../scripts/lib/postgres-user.mjs";
import { startThrowAwayCluster } from "../../scripts/lib/throwaway-cluster.mjs";

let throwAway;
let dataFolder;
let options;

before(async () => {
  throwAway = await startThrowAwayCluster();
  dataFolder = path.join(throwAway.folder, "data");
  options = {
    dataFolder,
    user: databaseUser(),
    password: throwAway.secrets.superuser,
    preferredPort: throwAway.cluster.port,
    durable: false,
  };
});
after(() => throwAway.dispose());

const pidFile = () => path.join(dataFolder, "postmaster.pid");

test("the server listens on loopback alone, wants a password, and is not root's", async () => {
  const { cluster } = throwAway;
  assert.equal((await cluster.sql("show listen_addresses")).trim(), "127.0.0.1");
  assert.equal((await cluster.sql("show unix_socket_directories")).trim(), "");
  const methods = await cluster.sql("select distinct auth_method from pg_hba_file_rules");
  assert.equal(methods.trim(), "scram-sha-256");
  assert.notEqual(fs.statSync(dataFolder).uid, 0);
  assert.equal(fs.statSync(dataFolder).mode & 0o077, 0);
});

test("the owner of the database is no superuser", async () => {
  const row = await throwAway.cluster.sql(
    "select rolsuper, rolcreaterole from pg_roles where rolname = 'agraffe_owner'",
  );
  assert.equal(row.trim(), "f|t");
});

test("a second cluster beside it takes another port", async () => {
  const second = await startThrowAwayCluster();
  try {
    assert.notEqual(second.cluster.port, throwAway.cluster.port);
    assert.notEqual(second.folder, throwAway.folder);
  } finally {
    await second.dispose();
  }
  assert.equal(fs.existsSync(second.folder), false);
});

test("a server still running on the data is stopped cleanly before the next start", async () => {
  const old = throwAway.cluster;
  throwAway.cluster = await startCluster(options);
  assert.equal((await old.server.exited).code, 0);
  assert.equal((await throwAway.cluster.sql("select 1")).trim(), "1");
});

test("the data opens again after the server was killed", async () => {
  await throwAway.cluster.sql("create table kept (n int); insert into kept values (7); checkpoint");
  throwAway.cluster.server.signal("SIGKILL");
  await throwAway.cluster.server.exited;
  assert.ok(fs.existsSync(pidFile()));
  throwAway.cluster = await startCluster(options);
  assert.equal((await throwAway.cluster.sql("select n from kept")).trim(), "7");
});

test("a pid file that names an unrelated living process does not stop the start, nor harm that process", async () => {
  await throwAway.cluster.stop();
  fs.writeFileSync(pidFile(), `${process.pid}\n${dataFolder}\n0\n5432\n\n127.0.0.1\n  1 1\nready\n`);
  if (options.user) fs.chownSync(pidFile(), options.user.uid, options.user.gid);
  throwAway.cluster = await startCluster(options);
  assert.equal((await throwAway.cluster.sql("select 1")).trim(), "1");
});

test("a taken port is given up for the next", async () => {
  await throwAway.cluster.stop();
  const blocker = net.createServer();
  await new Promise((resolve) => blocker.listen(options.preferredPort, "127.0.0.1", resolve));
  throwAway.cluster = await startCluster(options);
  assert.notEqual(throwAway.cluster.port, options.preferredPort);
  await new Promise((resolve) => blocker.close(resolve));
});

test("the wrong password is named as such instead of waiting for ever", async () => {
  await throwAway.cluster.stop();
  await assert.rejects(startCluster({ ...options, password: "another" }), /secrets\.json/);
  throwAway.cluster = await startCluster(options);
});
