import { spawn } from 'node:child_process'
import { createWriteStream } from 'node:fs'
import { PlainError, readLogOfFailure } from './say.mjs'

/**
 * @typedef {object} RunOptions
 * @property {NodeJS.ProcessEnv} [env]
 * @property {string} [cwd]
 * @property {number} [uid]
 * @property {number} [gid]
 * @property {string} [input] text for its standard input
 * @property {AbortSignal} [signal] ends the command when aborted
 * @property {boolean} [detached] in a process group of its own, out of reach of Ctrl-C
 */

/**
 * Runs a command to its end and keeps what it prints.
 * @param {string} command
 * @param {readonly string[]} args
 * @param {RunOptions} [options]
 * @returns {Promise<{ exitCode: number, output: string, errors: string }>}
 */
export function run(command, args, { input, ...options } = {}) {
  return new Promise((resolve, reject) => {
    const child = spawn(command, args, { ...options, stdio: ['pipe', 'pipe', 'pipe'] })
    let output = ''
    let errors = ''
    child.stdout.setEncoding('utf8').on('data', (text) => (output += text))
    child.stderr.setEncoding('utf8').on('data', (text) => (errors += text))
    child.once('error', reject)
    child.once('close', (code) => resolve({ exitCode: code ?? 1, output, errors }))
    // The command may end before it has read everything: its exit code tells, not the broken pipe.
    child.stdin.on('error', () => {})
    child.stdin.end(input ?? '')
  })
}

/**
 * Runs a long command with its output in a log file. When it fails, throws a PlainError with the telling part of that log.
 * @param {string} what for the message: 'The build'
 * @param {string} command
 * @param {readonly string[]} args
 * @param {RunOptions & { logFile: string }} options
 */
export async function runLogged(what, command, args, { logFile, ...options }) {
  const log = createWriteStream(logFile, { mode: 0o600 })
  await new Promise((resolve, reject) => log.once('open', resolve).once('error', reject))
  const exitCode = await new Promise((resolve, reject) => {
    const child = spawn(command, args, { ...options, stdio: ['ignore', log, log] })
    // An abort comes as an error, too: the end of the command is what counts then.
    child.once('error', (error) => error.name === 'AbortError' || reject(error))
    child.once('close', (code) => resolve(code ?? 1))
  }).finally(() => log.end())
  if (options.signal?.aborted) throw new PlainError(`${what} was stopped.`)
  if (exitCode !== 0) {
    throw new PlainError(`${what} failed (exit code ${exitCode}). From ${logFile}:\n\n${await readLogOfFailure(logFile)}`)
  }
}
