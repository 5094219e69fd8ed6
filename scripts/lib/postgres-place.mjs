import { createHash } from 'node:crypto'
import { chmodSync, existsSync, mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { DATA_FOLDER, PROJECT_FOLDER } from './project.mjs'
import { canEnter, choosePostgresUser } from './postgres-user.mjs'
import { PlainError, say } from './say.mjs'

const USUAL_FOLDER = join(DATA_FOLDER, 'postgres')
const RECORD = join(DATA_FOLDER, 'postgres-folder')

/**
 * The folder of the lasting cluster. Usually `.data/postgres`; where root started us and PostgreSQL's user cannot reach the
 * project (a home folder closed to others), a folder under /var/lib instead, recorded in `.data/postgres-folder`.
 * @returns {Promise<string>}
 */
export async function resolveClusterFolder() {
  if (existsSync(RECORD)) return readFileSync(RECORD, 'utf8').trim()
  const user = choosePostgresUser(USUAL_FOLDER)
  if (await canEnter(user, DATA_FOLDER)) return USUAL_FOLDER
  if (existsSync(USUAL_FOLDER)) {
    throw new PlainError(`The user "${user.name}", who owns the database in ${USUAL_FOLDER}, may no longer pass through a folder above it. Give that right back (chmod o+x), or delete ${USUAL_FOLDER} (its demo data is lost).`)
  }
  const projectHash = createHash('sha256').update(PROJECT_FOLDER).digest('hex').slice(0, 12)
  const outside = `/var/lib/wirewright-${projectHash}`
  mkdirSync(outside, { recursive: true, mode: 0o711 })
  chmodSync(outside, 0o711)
  const folder = join(outside, 'postgres')
  writeFileSync(RECORD, `${folder}\n`)
  say(`PostgreSQL runs as the user "${user.name}", who may not enter the project's folder: the database is kept in ${folder}.`)
  return folder
}

/**
 * A new folder for a throw-away cluster, in a temporary folder that PostgreSQL's user can reach.
 * @returns {Promise<string>}
 */
export async function makeTemporaryFolder() {
  for (const parent of new Set([tmpdir(), '/tmp', '/var/tmp'])) {
    const folder = mkdtempSync(join(parent, 'wirewright-'))
    chmodSync(folder, 0o711)
    if (await canEnter(choosePostgresUser(join(folder, 'postgres')), folder)) return folder
    rmSync(folder, { recursive: true })
  }
  throw new PlainError("PostgreSQL's user can enter neither the temporary folder nor /tmp nor /var/tmp: give it the right to pass through (chmod o+x).")
}
