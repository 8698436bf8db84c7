/** Folders of tests that need nothing but Node. */
const PURE = /^(\.\/)?tests\/(shared|simulator|src|architecture)(\/|$)/;

/**
 * Whether a test run needs PostgreSQL, a browser, MQTT clients and the built client: yes, unless every place that was
 * asked for is known to do without.
 *
 * @param {readonly string[]} args
 */
export function needsServices(args) {
  const places = args.filter((arg) => !arg.startsWith('-'));
  return places.length === 0 || !places.every((place) => PURE.test(place));
}

/**
 * What the tests came to, from Vitest's JSON report. A file that could not even be loaded has no tests and counts as
 * one that failed, and so does a run that ended badly without saying why, or that found nothing to run.
 *
 * @param {string | undefined} json undefined when there is no report
 * @param {number | null} exitCode
 */
export function countResults(json, exitCode) {
  /** @type {{ numPassedTests?: number, numFailedTests?: number, testResults?: { status: string, assertionResults: unknown[] }[] }} */
  const report = json === undefined ? {} : JSON.parse(json);
  const unloadable = (report.testResults ?? []).filter(
    ({ status, assertionResults }) => status === 'failed' && assertionResults.length === 0,
  );
  const passed = report.numPassedTests ?? 0;
  const failed = (report.numFailedTests ?? 0) + unloadable.length;
  const isBad = exitCode !== 0 || passed === 0;
  return { passed, failed: failed === 0 && isBad ? 1 : failed };
}
