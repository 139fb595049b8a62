import fs from "node:fs";

function readJson(file) {
  try {
    return JSON.parse(fs.readFileSync(file, "utf8"));
  } catch {
    return undefined;
  }
}

/** A test file that could not be loaded has no tests to fail, and counts as one. */
export function vitestCounts(report) {
  const brokenFiles = (report?.testResults ?? []).filter(
    (file) => file.status === "failed" && !file.assertionResults.some((test) => test.status === "failed"),
  );
  return {
    passed: report?.numPassedTests ?? 0,
    failed: (report?.numFailedTests ?? 0) + brokenFiles.length,
    skipped: (report?.numPendingTests ?? 0) + (report?.numTodoTests ?? 0),
  };
}

export function playwrightCounts(report) {
  const { expected = 0, unexpected = 0, flaky = 0, skipped = 0 } = report?.stats ?? {};
  return { passed: expected, failed: unexpected + flaky + (report?.errors?.length ?? 0), skipped };
}

export function nodeTestCounts(tap) {
  const count = (word) => Number(tap.match(new RegExp(`^# ${word} (\\d+)$`, "m"))?.[1] ?? 0);
  return { passed: count("pass"), failed: count("fail") + count("cancelled"), skipped: count("skipped") };
}

/** A runner that ends badly without naming a failed test has failed all the same. */
export function settle(counts, exitCode) {
  return exitCode !== 0 && counts.failed === 0 ? { ...counts, failed: 1 } : counts;
}

export function vitestFileCounts(file) {
  return vitestCounts(readJson(file));
}

export function playwrightFileCounts(file) {
  return playwrightCounts(readJson(file));
}
