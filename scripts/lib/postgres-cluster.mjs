import { chmodSync, chownSync, existsSync, mkdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { isAlive, listChildPids, waitUntilGone } from './process-identity.mjs'
import { isRoot } from './project.mjs'
import { choosePostgresUser, spawnAs } from './postgres-user.mjs'
import { run } from './run.mjs'
import { PlainError, readLogTail, say } from './say.mjs'

/**
 * @typedef {import('./postgres-programs.mjs').PostgresPrograms} PostgresPrograms
 * @typedef {import('./processes.mjs').Processes} Processes
 *
 * @typedef {object} Cluster
 * @property {string} folder
 * @property {PostgresPrograms} programs
 * @property {number} port
 * @property {string} adminPassword
 * @property {boolean} isThrowAway true in tests: nothing is forced to the disk
 * @property {string} logFile
 */

/** The role that initdb makes; used to create the two roles of the product and for nothing else. */
export const ADMIN_ROLE = 'wirewright_admin'
const START_TIMEOUT_MS = 30_000
const STOP_TIMEOUT_MS = 20_000

/**
 * The major version that made the cluster, or null where there is none yet.
 * @param {string} folder
 */
export function readClusterVersion(folder) {
  try {
    return Number.parseInt(readFileSync(join(folder, 'PG_VERSION'), 'utf8'), 10)
  } catch (error) {
    if (error instanceof Error && 'code' in error && error.code === 'EACCES') choosePostgresUser(folder)
    return null
  }
}

/**
 * Makes the cluster if there is none. It grows beside its place and is moved there when complete, so that an
 * interrupted first start leaves nothing half made.
 * @param {Cluster} cluster
 */
export async function ensureClusterExists({ folder, programs, adminPassword }) {
  if (existsSync(folder)) return
  const user = choosePostgresUser(folder)
  const growing = `${folder}.new`
  const passwordFile = `${folder}.password`
  rmSync(growing, { recursive: true, force: true })
  mkdirSync(growing, { recursive: true, mode: 0o700 })
  writeFileSync(passwordFile, adminPassword, { mode: 0o600 })
  if (isRoot()) for (const path of [growing, passwordFile]) chownSync(path, user.uid, user.gid)
  chmodSync(growing, 0o700)
  try {
    const { exitCode, output, errors } = await run(
      join(programs.folder, 'initdb'),
      ['-D', growing, '-U', ADMIN_ROLE, '--pwfile', passwordFile, '--auth-local=scram-sha-256', '--auth-host=scram-sha-256', '-E', 'UTF8', '--locale=C.UTF-8', '-N'],
      spawnAs(user),
    )
    if (exitCode !== 0) throw new PlainError(`PostgreSQL could not make its data folder ${folder}:\n\n${output}${errors}`)
    renameSync(growing, folder)
  } finally {
    rmSync(passwordFile, { force: true })
    rmSync(growing, { recursive: true, force: true })
  }
}

/**
 * Stops a server that still runs on this folder after its launcher was killed, and only such a one.
 * @param {string} folder
 */
export async function stopForgottenServer(folder) {
  const pid = readServerPid(folder)
  if (pid === null || !isAlive(pid) || !isServerOf(pid, folder)) return
  say('A PostgreSQL of an earlier start still runs on this database: stopping it cleanly.')
  process.kill(pid, 'SIGINT')
  if (await waitUntilGone(pid, STOP_TIMEOUT_MS)) return
  throw new PlainError(`The PostgreSQL of an earlier start (process ${pid}) does not stop. End it by hand: kill -QUIT ${pid}`)
}

/** @param {string} folder */
function readServerPid(folder) {
  try {
    return Number.parseInt(readFileSync(join(folder, 'postmaster.pid'), 'utf8'), 10)
  } catch {
    return null
  }
}

/**
 * The number in postmaster.pid may by now belong to any program: its command line must name this folder.
 * @param {number} pid
 * @param {string} folder
 */
function isServerOf(pid, folder) {
  try {
    return readFileSync(`/proc/${pid}/cmdline`, 'utf8').split('\0').includes(folder)
  } catch {
    return false
  }
}

/**
 * Starts the server and waits until it answers.
 * @param {Cluster} cluster
 * @param {Processes} processes
 */
export async function startCluster(cluster, processes) {
  const { folder, programs, port, isThrowAway, logFile } = cluster
  const unsafe = isThrowAway ? ['-c', 'fsync=off', '-c', 'synchronous_commit=off', '-c', 'full_page_writes=off'] : []
  const postgres = processes.start({
    name: 'PostgreSQL',
    command: join(programs.folder, 'postgres'),
    args: ['-D', folder, '-p', String(port), '-c', 'listen_addresses=127.0.0.1', '-c', 'unix_socket_directories=', '-c', 'timezone=UTC', '-c', 'log_timezone=UTC', ...unsafe],
    env: { PATH: process.env.PATH, LANG: 'C.UTF-8' },
    logFile,
    // Fast shutdown: open connections are ended, and everything is written.
    stopSignal: 'SIGINT',
    stopTimeoutMs: STOP_TIMEOUT_MS,
    ...spawnAs(choosePostgresUser(folder)),
  })
  const deadline = Date.now() + START_TIMEOUT_MS
  while (!(await isReady(cluster))) {
    if (postgres.hasExited()) throw new PlainError(`PostgreSQL did not start. The end of ${logFile}:\n\n${await readLogTail(logFile)}`)
    if (Date.now() > deadline) throw new PlainError(`PostgreSQL was not ready after ${START_TIMEOUT_MS / 1000} s. See ${logFile}.`)
    await new Promise((resolve) => setTimeout(resolve, 50))
  }
  return postgres
}

/** @param {Cluster} cluster */
async function isReady({ programs, port }) {
  const { exitCode } = await run(join(programs.folder, 'pg_isready'), ['-q', '-h', '127.0.0.1', '-p', String(port), '-d', 'postgres'], { cwd: '/' })
  return exitCode === 0
}

/**
 * Kills the server as a power cut would, and waits for the processes that served its connections: the next start
 * refuses to run while one of them is left.
 * @param {import('./processes.mjs').ManagedProcess} postgres
 */
export async function killCluster(postgres) {
  const serving = listChildPids(postgres.pid)
  await postgres.kill()
  await Promise.all(serving.map((pid) => waitUntilGone(pid, STOP_TIMEOUT_MS)))
}

/**
 * Runs SQL as the administrator of the cluster. It goes in by standard input, so no password shows in the process list.
 * @param {Cluster} cluster
 * @param {string} database
 * @param {string} sql
 */
export async function runAdminSql({ folder, programs, port, adminPassword }, database, sql) {
  const { exitCode, output, errors } = await run(
    join(programs.folder, 'psql'),
    ['-X', '-q', '-A', '-t', '-v', 'ON_ERROR_STOP=1', '-h', '127.0.0.1', '-p', String(port), '-U', ADMIN_ROLE, '-d', database],
    { env: { PATH: process.env.PATH, PGPASSWORD: adminPassword, PGCONNECT_TIMEOUT: '10' }, cwd: '/', input: sql },
  )
  if (/password authentication failed/.test(errors)) {
    throw new PlainError(`The passwords in .data/secrets.json do not belong to the database in ${folder}. Put the right file back, or delete that folder to begin afresh (its demo data is lost).`)
  }
  if (exitCode !== 0) throw new PlainError(`PostgreSQL refused a set-up step: ${errors.trim()}`)
  return output.trim()
}
