import { spawn } from 'node:child_process'
import { mkdirSync, rmSync } from 'node:fs'
import { join } from 'node:path'
import { ensureTestPrograms } from './debian-packages.mjs'
import { ensureBuilt } from './build-stamp.mjs'
import { ensurePostgresPrograms } from './postgres-programs.mjs'
import { DATA_FOLDER, PROJECT_FOLDER, projectPath } from './project.mjs'
import { say } from './say.mjs'
import { countPlaywrightReport, countVitestReport, readReport } from './test-reports.mjs'

/**
 * @typedef {import('./test-reports.mjs').StageResult} StageResult
 *
 * @typedef {object} Stage
 * @property {string} name as given on the command line
 * @property {number} minutes after which it is ended and counts as failed
 * @property {readonly string[]} args of node
 * @property {{ path: string, count: (report: unknown) => StageResult } | null} report null: the exit code is the one result
 * @property {() => Promise<void>} [prepare]
 */

const RESULTS = join(DATA_FOLDER, 'test-results')
const LOGS = join(DATA_FOLDER, 'logs')

/**
 * @param {string} project
 * @param {number} minutes
 * @param {() => Promise<void>} [prepare]
 * @returns {Stage}
 */
function vitestStage(project, minutes, prepare) {
  const path = join(RESULTS, `${project}.json`)
  const vitest = projectPath('node_modules', 'vitest', 'vitest.mjs')
  return {
    name: project,
    minutes,
    args: [vitest, 'run', '--project', project, '--reporter=default', '--reporter=json', `--outputFile.json=${path}`],
    report: { path, count: countVitestReport },
    prepare,
  }
}

const prepareTestPrograms = () => ensureTestPrograms({ logFile: join(LOGS, 'apt-get-tests.log') })

async function prepareServices() {
  await ensurePostgresPrograms(null, { logFile: join(LOGS, 'apt-get.log') })
  await ensureBuilt({ logFile: join(LOGS, 'build.log'), report: say })
}

async function prepareServicesAndPrograms() {
  await prepareTestPrograms()
  await prepareServices()
}

/** In the order in which they run: what is quick and most likely to fail comes first. */
export const STAGES = /** @type {ReadonlyArray<Stage>} */ ([
  { name: 'lint', minutes: 4, args: [projectPath('node_modules', 'eslint', 'bin', 'eslint.js'), '--max-warnings', '0', '.'], report: null },
  { name: 'types', minutes: 4, args: [projectPath('node_modules', 'nuxt', 'bin', 'nuxt.mjs'), 'typecheck'], report: null },
  vitestStage('unit', 8),
  vitestStage('reference', 8, prepareTestPrograms),
  vitestStage('api', 10, prepareServicesAndPrograms),
  {
    name: 'e2e',
    minutes: 14,
    args: [projectPath('node_modules', '@playwright', 'test', 'cli.js'), 'test'],
    report: { path: projectPath('test-results', 'e2e.json'), count: countPlaywrightReport },
    prepare: prepareServicesAndPrograms,
  },
])

/**
 * Runs one stage with its output on the terminal.
 * @param {Stage} stage
 * @param {AbortSignal} signal ends it early
 * @returns {Promise<StageResult>}
 */
export async function runStage({ args, minutes, report, prepare }, signal) {
  await prepare?.()
  signal.throwIfAborted()
  mkdirSync(RESULTS, { recursive: true })
  if (report) rmSync(report.path, { force: true })
  const { exitCode, isOverTime } = await runToEnd(args, minutes * 60_000, signal)
  const result = report ? readReport(report.count, report.path, exitCode) : readExitCode(exitCode)
  if (!isOverTime) return result
  return { ...result, failed: Math.max(result.failed, 1), remarks: [...result.remarks, `ended after ${minutes} minutes`] }
}

/**
 * @param {number} exitCode
 * @returns {StageResult}
 */
function readExitCode(exitCode) {
  return exitCode === 0 ? { passed: 1, failed: 0, skipped: 0, remarks: [] } : { passed: 0, failed: 1, skipped: 0, remarks: [] }
}

/**
 * @param {readonly string[]} args
 * @param {number} timeoutMs
 * @param {AbortSignal} signal
 * @returns {Promise<{ exitCode: number, isOverTime: boolean }>}
 */
function runToEnd(args, timeoutMs, signal) {
  return new Promise((resolve, reject) => {
    const child = spawn(process.execPath, args, { cwd: PROJECT_FOLDER, env: { ...process.env, NUXT_TELEMETRY_DISABLED: '1' }, stdio: ['ignore', 'inherit', 'inherit'] })
    let isOverTime = false
    const end = () => {
      child.kill('SIGTERM')
      setTimeout(() => child.kill('SIGKILL'), 15_000).unref()
    }
    const timer = setTimeout(() => {
      isOverTime = true
      end()
    }, timeoutMs)
    signal.addEventListener('abort', end, { once: true })
    child.once('error', reject)
    child.once('exit', (code) => {
      clearTimeout(timer)
      signal.removeEventListener('abort', end)
      resolve({ exitCode: code ?? 1, isOverTime })
    })
  })
}
