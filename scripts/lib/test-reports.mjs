import { readFileSync } from 'node:fs'

/**
 * @typedef {object} StageResult
 * @property {number} passed
 * @property {number} failed
 * @property {number} skipped
 * @property {string[]} remarks what went wrong beside single tests
 */

/**
 * Counts the tests in a report, and never takes silence for success: a stage whose program failed, whose report is
 * missing, or that ran no test has at least one failure.
 * @param {(report: unknown) => StageResult} count
 * @param {string} reportPath
 * @param {number} exitCode of the program that should have written the report
 * @returns {StageResult}
 */
export function readReport(count, reportPath, exitCode) {
  /** @type {StageResult} */
  let result
  try {
    result = count(JSON.parse(readFileSync(reportPath, 'utf8')))
  } catch {
    return { passed: 0, failed: 1, skipped: 0, remarks: [`no readable report (exit code ${exitCode})`] }
  }
  if (result.failed > 0) return result
  if (exitCode !== 0) return { ...result, failed: 1, remarks: [...result.remarks, `exit code ${exitCode} although no test failed`] }
  if (result.passed === 0) return { ...result, failed: 1, remarks: [...result.remarks, 'not one test ran'] }
  return result
}

/**
 * The JSON report of vitest. A file that could not be loaded has no tests to fail: it counts as one failure.
 * @param {unknown} report
 * @returns {StageResult}
 */
export function countVitestReport(report) {
  const { numPassedTests, numFailedTests, numPendingTests, numTodoTests, testResults } =
    /** @type {{ numPassedTests: number, numFailedTests: number, numPendingTests: number, numTodoTests: number, testResults: Array<{ name: string, status: string, assertionResults: Array<{ status: string }> }> }} */ (report)
  const broken = testResults.filter(({ status, assertionResults }) => status === 'failed' && !assertionResults.some((test) => test.status === 'failed'))
  return {
    passed: numPassedTests,
    failed: numFailedTests + broken.length,
    skipped: numPendingTests + numTodoTests,
    remarks: broken.map(({ name }) => `${name} could not be run`),
  }
}

/**
 * The JSON report of playwright. A test that passed only when repeated counts as failed.
 * @param {unknown} report
 * @returns {StageResult}
 */
export function countPlaywrightReport(report) {
  const { stats, errors } = /** @type {{ stats: { expected: number, unexpected: number, flaky: number, skipped: number }, errors: Array<{ message?: string }> }} */ (report)
  return {
    passed: stats.expected,
    failed: stats.unexpected + stats.flaky + errors.length,
    skipped: stats.skipped,
    remarks: errors.map(({ message }) => message?.split('\n')[0] ?? 'an error outside the tests'),
  }
}
