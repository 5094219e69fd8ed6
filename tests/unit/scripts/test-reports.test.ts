import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { countPlaywrightReport, countVitestReport, readReport } from '../../../scripts/lib/test-reports.mjs'

const vitest = (counts: { passed: number, failed?: number, skipped?: number }, files: object[] = []) => ({
  numPassedTests: counts.passed, numFailedTests: counts.failed ?? 0, numPendingTests: counts.skipped ?? 0, numTodoTests: 0, testResults: files,
})

describe('the count of a vitest report', () => {
  it('takes the numbers of single tests', () => {
    expect(countVitestReport(vitest({ passed: 7, failed: 2, skipped: 1 }))).toEqual({ passed: 7, failed: 2, skipped: 1, remarks: [] })
  })

  it('counts a file that could not be loaded as one failure and names it', () => {
    const files = [{ name: 'broken.test.ts', status: 'failed', assertionResults: [] }, { name: 'red.test.ts', status: 'failed', assertionResults: [{ status: 'failed' }] }]
    expect(countVitestReport(vitest({ passed: 1, failed: 1 }, files))).toMatchObject({ failed: 2, remarks: ['broken.test.ts could not be run'] })
  })
})

describe('the count of a playwright report', () => {
  it('counts a test that passed only at the second try as failed, and errors outside the tests', () => {
    expect(countPlaywrightReport({ stats: { expected: 5, unexpected: 1, flaky: 1, skipped: 2 }, errors: [{ message: 'set-up failed\nat ...' }] }))
      .toEqual({ passed: 5, failed: 3, skipped: 2, remarks: ['set-up failed'] })
  })
})

describe('silence', () => {
  let folder = ''
  const reportOf = (content: string): string => {
    const path = join(folder, 'report.json')
    writeFileSync(path, content)
    return path
  }
  beforeEach(() => {
    folder = mkdtempSync(join(tmpdir(), 'wirewright-report-'))
  })
  afterEach(() => rmSync(folder, { recursive: true }))

  it('is no success when the report is missing', () => {
    expect(readReport(countVitestReport, join(folder, 'none.json'), 0)).toMatchObject({ passed: 0, failed: 1 })
  })

  it('is no success when the report is cut off', () => {
    expect(readReport(countVitestReport, reportOf('{"numPassed'), 0).failed).toBe(1)
  })

  it('is no success when not one test ran', () => {
    expect(readReport(countVitestReport, reportOf(JSON.stringify(vitest({ passed: 0, skipped: 3 }))), 0)).toMatchObject({ failed: 1, remarks: ['not one test ran'] })
  })

  it('is no success when the program failed although every test passed', () => {
    expect(readReport(countVitestReport, reportOf(JSON.stringify(vitest({ passed: 3 }))), 1)).toMatchObject({ passed: 3, failed: 1 })
  })

  it('leaves a clean report as it is', () => {
    expect(readReport(countVitestReport, reportOf(JSON.stringify(vitest({ passed: 3 }))), 0)).toEqual({ passed: 3, failed: 0, skipped: 0, remarks: [] })
  })
})
