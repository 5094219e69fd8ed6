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
