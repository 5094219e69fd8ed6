import { existsSync, readFileSync, statSync } from 'node:fs'
import { userInfo } from 'node:os'
import { isRoot } from './project.mjs'
import { run } from './run.mjs'
import { PlainError } from './say.mjs'

/**
 * @typedef {object} SystemUser
 * @property {string} name
 * @property {number} uid
 * @property {number} gid
 */

/**
 * The user PostgreSQL runs as. Its programs refuse root, so root hands them to `postgres` or `nobody`;
 * an existing cluster stays with the user who owns it.
 * @param {string} clusterFolder
 * @returns {SystemUser}
 */
export function choosePostgresUser(clusterFolder) {
  const owner = existsSync(clusterFolder) ? statSync(clusterFolder) : null
  if (!isRoot()) return chooseOwnUser(clusterFolder, owner)
  if (owner && owner.uid !== 0) return { name: findUserById(owner.uid)?.name ?? String(owner.uid), uid: owner.uid, gid: owner.gid }
  const user = findUserByName('postgres') ?? findUserByName('nobody')
  if (!user) throw new PlainError('PostgreSQL refuses to run as root, and this machine has neither a user "postgres" nor "nobody". Run npm start as an ordinary user.')
  return user
}

/**
 * @param {string} clusterFolder
 * @param {{ uid: number } | null} owner
 * @returns {SystemUser}
 */
function chooseOwnUser(clusterFolder, owner) {
  const { username, uid, gid } = userInfo()
  if (owner && owner.uid !== uid) {
    throw new PlainError(`The database in ${clusterFolder} belongs to another user. Start Wirewright as root or as the user who started it here before.`)
  }
  return { name: username, uid, gid }
}

/**
 * What `spawn` needs so that the program runs as that user, away from a folder the user may not enter.
 * @param {SystemUser} user
 */
export function spawnAs(user) {
  return isRoot() ? { uid: user.uid, gid: user.gid, cwd: '/' } : { cwd: '/' }
}

/**
 * Whether the user can pass through every parent of a folder and enter it.
 * @param {SystemUser} user
 * @param {string} folder
 */
export async function canEnter(user, folder) {
  const { exitCode } = await run('/usr/bin/test', ['-x', folder], spawnAs(user))
  return exitCode === 0
}

/** @param {string} name */
function findUserByName(name) {
  return listUsers().find((user) => user.name === name) ?? null
}

/** @param {number} uid */
function findUserById(uid) {
  return listUsers().find((user) => user.uid === uid) ?? null
}

/** @returns {SystemUser[]} */
function listUsers() {
  return readFileSync('/etc/passwd', 'utf8')
    .split('\n')
    .map((line) => line.split(':'))
    .filter((fields) => fields.length >= 4)
    .map(([name = '', , uid, gid]) => ({ name, uid: Number(uid), gid: Number(gid) }))
}
