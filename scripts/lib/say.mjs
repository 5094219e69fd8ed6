import { readFile } from 'node:fs/promises'

/** A failure whose message is meant for the person at the keyboard: it says what is wrong and what would put it right. */
export class PlainError extends Error {
  /** @param {string} message */
  constructor(message) {
    super(message)
    this.name = 'PlainError'
  }
}

/**
 * Prints one line about what is happening.
 * @param {string} text
 */
export function say(text) {
  console.log(text)
}

/**
 * The same for processes whose standard output belongs to somebody else (the test services under vitest or playwright).
 * @param {string} text
 */
export function sayOnStandardError(text) {
  console.error(text)
}

/**
 * What to print for a failure: the message alone when it was written for a person, the whole stack otherwise.
 * @param {unknown} failure
 */
export function describeFailure(failure) {
  if (failure instanceof PlainError) return failure.message
  return failure instanceof Error ? (failure.stack ?? failure.message) : String(failure)
}

/**
 * The last lines of a log file, or an empty text when there is none.
 * @param {string} path
 * @param {number} lineCount
 */
export async function readLogTail(path, lineCount = 25) {
  try {
    return (await readFile(path, 'utf8')).trimEnd().split('\n').slice(-lineCount).join('\n')
  } catch {
    return ''
  }
}

/**
 * The part of a log that tells why a command failed: from the first line that speaks of an error, or else the last lines.
 * @param {string} path
 */
export async function readLogOfFailure(path) {
  const lines = (await readLogTail(path, Number.MAX_SAFE_INTEGER)).split('\n')
  const first = lines.findIndex((line) => /\b(ERROR|npm error|E:|\w*Error:)/.test(line))
  return (first < 0 ? lines.slice(-25) : lines.slice(Math.max(0, first - 1), first + 24)).join('\n')
}
