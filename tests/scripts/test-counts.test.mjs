import assert from "node:assert/strict";
import { test } from "node:test";
import { nodeTestCounts, playwrightCounts, settle, vitestCounts } from "../../scripts/lib/test-counts.mjs";

test("a test file that cannot be loaded counts as a failure", () => {
  const broken = { status: "failed", assertionResults: [] };
  const failing = { status: "failed", assertionResults: [{ status: "failed" }, { status: "passed" }] };
  const report = { numPassedTests: 4, numFailedTests: 1, testResults: [broken, failing] };
  assert.deepEqual(vitestCounts(report), { passed: 4, failed: 2, skipped: 0 });
});

test("a browser test that passes only at a second try has failed", () => {
  const counts = playwrightCounts({
    stats: { expected: 3, unexpected: 1, flaky: 1, skipped: 2 },
    errors: [],
  });
  assert.deepEqual(counts, { passed: 3, failed: 2, skipped: 2 });
});

test("the counts of Node's own runner are read from its closing lines", () => {
  const tap = "TAP version 13\nok 1 - x\n# tests 7\n# pass 5\n# fail 1\n# cancelled 1\n# skipped 0\n";
  assert.deepEqual(nodeTestCounts(tap), { passed: 5, failed: 2, skipped: 0 });
});

test("a runner that dies without a report has failed", () => {
  assert.equal(settle(vitestCounts(undefined), 1).failed, 1);
  assert.equal(settle(vitestCounts(undefined), 0).failed, 0);
});
