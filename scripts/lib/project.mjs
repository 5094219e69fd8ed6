import { accessSync, chmodSync, constants, mkdirSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { PlainError } from './say.mjs'

/** The folder of the project. */
export const PROJECT_FOLDER = dirname(dirname(dirname(fileURLToPath(import.meta.url))))

/** Everything `npm start` keeps between two runs. */
export const DATA_FOLDER = join(PROJECT_FOLDER, '.data')

export const START_LOCK = join(DATA_FOLDER, 'start.lock')

/**
 * @param {...string} parts
 */
export function projectPath(...parts) {
  return join(PROJECT_FOLDER, ...parts)
}

/** True where we may install packages and change users. */
export function isRoot() {
  return process.getuid?.() === 0
}

/** Stops with a plain message when the Node.js that runs this is not one the packages work with. */
export function assertNodeVersion() {
  const [major = 0, minor = 0] = process.versions.node.split('.').map(Number)
  const isSupported = (major === 20 && minor >= 19) || (major === 22 && minor >= 12) || major > 22
  if (!isSupported) throw new PlainError(`Node.js ${process.versions.node} is too old or not a long-term release. Install Node.js 20.19 or newer (20, 22 or later).`)
}

/**
 * Makes the data folder. Others may pass through it (PostgreSQL runs as another user when root starts us) but not list it;
 * the files in it that hold secrets are readable by their owner only.
 */
export function makeDataFolder() {
  mkdirSync(join(DATA_FOLDER, 'logs'), { recursive: true })
  try {
    accessSync(DATA_FOLDER, constants.W_OK)
    if (isRoot()) chmodSync(DATA_FOLDER, 0o711)
  } catch {
    throw new PlainError(`This user may not write to ${DATA_FOLDER}. Start as the user who started Wirewright here before, or delete that folder (its demo data is lost).`)
  }
}
