// Runs every check of the project, or the stages named, and sums them up in one closing line.
// Usage: npm test    or    node scripts/test.mjs unit api    (stages: lint, types, unit, reference, api, e2e)
import { join } from 'node:path'
import { ensureNpmPackages } from './lib/npm-packages.mjs'
import { DATA_FOLDER, assertNodeVersion, makeDataFolder } from './lib/project.mjs'
import { PlainError, describeFailure, say } from './lib/say.mjs'
import { onStopRequest } from './lib/stop-requests.mjs'
import { STAGES, runStage } from './lib/test-stages.mjs'

/** @typedef {import('./lib/test-reports.mjs').StageResult & { name: string, seconds: number }} TimedResult */

/** @param {readonly string[]} names */
function chooseStages(names) {
  const unknown = names.filter((name) => !STAGES.some((stage) => stage.name === name))
  if (unknown.length > 0) throw new PlainError(`There is no stage called ${unknown.join(', ')}. The stages are: ${STAGES.map(({ name }) => name).join(', ')}.`)
  return names.length === 0 ? STAGES : STAGES.filter(({ name }) => names.includes(name))
}

/**
 * @param {import('./lib/test-stages.mjs').Stage} stage
 * @param {AbortSignal} signal
 * @returns {Promise<TimedResult>}
 */
async function runTimed(stage, signal) {
  say(`\n== ${stage.name} ==\n`)
  const startedAt = performance.now()
  const result = await runStage(stage, signal).catch((failure) => ({ passed: 0, failed: 1, skipped: 0, remarks: [describeFailure(failure)] }))
  if (signal.aborted) Object.assign(result, { failed: Math.max(result.failed, 1), remarks: ['stopped before its end'] })
  return { ...result, name: stage.name, seconds: (performance.now() - startedAt) / 1000 }
}

/** @param {readonly TimedResult[]} results */
function printSummary(results) {
  say('\n== summary ==\n')
  for (const { name, passed, failed, skipped, seconds, remarks } of results) {
    say(`  ${name.padEnd(10)} ${String(passed).padStart(5)} passed ${String(failed).padStart(4)} failed ${String(skipped).padStart(4)} skipped ${seconds.toFixed(1).padStart(7)} s`)
    for (const remark of remarks) say(`             ${remark}`)
  }
  const total = (/** @type {'passed' | 'failed'} */ key) => results.reduce((sum, result) => sum + result[key], 0)
  say(`\n${total('passed')} passed, ${total('failed')} failed`)
  return total('failed') === 0
}

async function main() {
  assertNodeVersion()
  const stages = chooseStages(process.argv.slice(2))
  makeDataFolder()
  const stopping = new AbortController()
  onStopRequest(() => stopping.abort())
  await ensureNpmPackages({ logFile: join(DATA_FOLDER, 'logs', 'npm-ci.log'), signal: stopping.signal })
  /** @type {TimedResult[]} */
  const results = []
  for (const stage of stages) {
    results.push(await runTimed(stage, stopping.signal))
    if (stopping.signal.aborted) break
  }
  if (!printSummary(results)) process.exitCode = 1
}

try {
  await main()
} catch (failure) {
  console.error(describeFailure(failure))
  process.exitCode = 1
}
