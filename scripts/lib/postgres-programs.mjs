import { readdirSync } from 'node:fs'
import { delimiter, join } from 'node:path'
import { installDebianPackages, isExecutable } from './debian-packages.mjs'
import { run } from './run.mjs'
import { PlainError } from './say.mjs'

/**
 * @typedef {object} PostgresPrograms
 * @property {string} folder where initdb, postgres, psql and pg_isready lie
 * @property {number} majorVersion
 */

const NEEDED = ['initdb', 'postgres', 'psql', 'pg_isready']
const OLDEST_MAJOR_VERSION = 15
const DEBIAN_FOLDER = '/usr/lib/postgresql'

/**
 * The server programs of PostgreSQL, installed from Debian if there are none.
 * @param {number | null} wantedMajorVersion that of an existing cluster: another version cannot read its files
 * @param {{ logFile: string }} options
 * @returns {Promise<PostgresPrograms>}
 */
export async function ensurePostgresPrograms(wantedMajorVersion, options) {
  const found = await findPostgresPrograms(wantedMajorVersion)
  if (found) return found
  const name = wantedMajorVersion === null ? 'postgresql' : `postgresql-${wantedMajorVersion}`
  const purpose = wantedMajorVersion === null ? 'PostgreSQL is not installed on this machine.' : `The database here was made by PostgreSQL ${wantedMajorVersion}, which is not installed.`
  await installDebianPackages(purpose, [name], { ...options, withPostgres: true })
  const installed = await findPostgresPrograms(wantedMajorVersion)
  if (installed) return installed
  throw new PlainError(`The package ${name} is installed, but brought no PostgreSQL ${OLDEST_MAJOR_VERSION} or newer under ${DEBIAN_FOLDER}. Install such a version, or name its folder in WIREWRIGHT_POSTGRES_BIN.`)
}

/**
 * @param {number | null} wantedMajorVersion
 * @returns {Promise<PostgresPrograms | null>}
 */
export async function findPostgresPrograms(wantedMajorVersion) {
  /** @type {PostgresPrograms[]} */
  const found = []
  for (const folder of listCandidateFolders()) {
    if (!NEEDED.every((program) => isExecutable(join(folder, program)))) continue
    const majorVersion = await readMajorVersion(folder)
    if (majorVersion >= OLDEST_MAJOR_VERSION) found.push({ folder, majorVersion })
  }
  if (wantedMajorVersion !== null) return found.find(({ majorVersion }) => majorVersion === wantedMajorVersion) ?? null
  return found[0] ?? null
}

/** The folder named by the user, then Debian's with the newest version first, then the search path. */
function listCandidateFolders() {
  const own = process.env.WIREWRIGHT_POSTGRES_BIN
  if (own) return [own]
  /** @type {string[]} */
  let versions = []
  try {
    versions = readdirSync(DEBIAN_FOLDER).sort((a, b) => Number(b) - Number(a))
  } catch {
    // No such folder: not Debian, or not installed.
  }
  const onPath = (process.env.PATH ?? '').split(delimiter).filter(Boolean)
  return [...versions.map((version) => join(DEBIAN_FOLDER, version, 'bin')), ...onPath]
}

/** @param {string} folder */
async function readMajorVersion(folder) {
  const { output } = await run(join(folder, 'postgres'), ['--version'], { cwd: '/' })
  return Number(/\(PostgreSQL\) (\d+)/.exec(output)?.[1] ?? Number.NaN)
}
