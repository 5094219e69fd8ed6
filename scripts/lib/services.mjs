import { mkdirSync } from 'node:fs'
import { holdFreePorts } from './ports.mjs'
import { buildAppEnv, buildMailInboxEnv, buildMigrationEnv, buildStripeFakeEnv, siteUrl } from './app-env.mjs'
import { APP_ENTRY } from './build-stamp.mjs'
import { waitUntilHealthy } from './health.mjs'
import { ensureClusterExists, killCluster, startCluster, stopForgottenServer } from './postgres-cluster.mjs'
import { ensureRolesAndDatabase } from './postgres-roles.mjs'
import { projectPath } from './project.mjs'
import { runLogged } from './run.mjs'

/**
 * @typedef {import('./processes.mjs').ManagedProcess} ManagedProcess
 * @typedef {import('./app-env.mjs').Surroundings} Surroundings
 *
 * @typedef {object} ServiceContext
 * @property {Surroundings} surroundings
 * @property {import('./postgres-cluster.mjs').Cluster} cluster
 * @property {import('./processes.mjs').Processes} processes
 * @property {(name: string) => string} logFile
 * @property {AbortSignal} [signal]
 *
 * @typedef {object} Service one part of the shop that can be started and stopped by itself
 * @property {(env?: NodeJS.ProcessEnv) => Promise<void>} start with settings that differ from the usual ones, if any
 * @property {() => Promise<void>} stop
 * @property {() => Promise<void>} kill
 *
 * @typedef {'database' | 'stripe-fake' | 'mail' | 'app' | 'second-app'} ServiceName
 */

/** Runs TypeScript in the very process we signal: `npx tsx` would put two more in between. */
const TYPESCRIPT = ['--import', 'tsx']

/**
 * Starts the database server and makes sure of the roles, the tables and, in an empty database, the demo shop.
 * @param {ServiceContext} context
 */
export async function prepareDatabase(context) {
  const { cluster, surroundings, signal, logFile } = context
  await stopForgottenServer(cluster.folder)
  await ensureClusterExists(cluster)
  const postgres = await startCluster(cluster, context.processes)
  await ensureRolesAndDatabase(cluster, surroundings.secrets)
  const options = { cwd: projectPath(), env: buildMigrationEnv(surroundings), signal }
  await runLogged('The migration of the database', process.execPath, [...TYPESCRIPT, 'server/database/migrate.ts'], { ...options, logFile: logFile('migrate') })
  await runLogged('Filling the demo shop', process.execPath, [...TYPESCRIPT, 'server/database/seed/main.ts'], { ...options, logFile: logFile('seed') })
  return postgres
}

/**
 * The services by name, none of them started but the database, which `prepareDatabase` has already started.
 * @param {ServiceContext} context
 * @param {ManagedProcess} postgres
 */
export async function defineServices(context, postgres) {
  const { surroundings, cluster, processes, logFile } = context
  const { ports } = surroundings
  const [secondAppPort = 0] = await holdFreePorts(1)
  mkdirSync(surroundings.mailFolder, { recursive: true, mode: 0o700 })
  /**
   * @param {string} name
   * @param {string} log
   * @param {readonly string[]} args
   * @param {NodeJS.ProcessEnv} env
   * @param {string} healthUrl
   */
  const node = (name, log, args, env, healthUrl) =>
    defineService(async (different) => {
      const managed = processes.start({ name, command: process.execPath, args, env: { ...env, ...different }, logFile: logFile(log) })
      await waitUntilHealthy(healthUrl, managed)
      return managed
    })
  /** @type {Record<ServiceName, Service>} */
  const services = {
    database: defineService(() => startCluster(cluster, processes), { running: postgres, kill: killCluster }),
    'stripe-fake': node('the Stripe fake', 'stripe-fake', [...TYPESCRIPT, 'tests/fakes/stripe/main.ts'], buildStripeFakeEnv(surroundings), `http://127.0.0.1:${ports.stripeFake}/_fake/health`),
    mail: node('the mail inbox', 'mail', ['scripts/mail-inbox.mjs'], buildMailInboxEnv(surroundings), `http://127.0.0.1:${ports.mailWeb}/api/healthz`),
    app: node('the app', 'app', [APP_ENTRY], buildAppEnv(surroundings), `${siteUrl(surroundings)}/api/health`),
    'second-app': node('the second app', 'second-app', [APP_ENTRY], buildAppEnv(surroundings, secondAppPort), `http://127.0.0.1:${secondAppPort}/api/health`),
  }
  return { services, secondAppUrl: `http://127.0.0.1:${secondAppPort}` }
}

/**
 * @param {(different?: NodeJS.ProcessEnv) => Promise<ManagedProcess>} launch
 * @param {{ running?: ManagedProcess, kill?: (managed: ManagedProcess) => Promise<void> }} [options]
 * @returns {Service}
 */
function defineService(launch, { running, kill = (managed) => managed.kill() } = {}) {
  let current = running
  return {
    start: async (different) => {
      if (!current || current.hasExited()) current = await launch(different)
    },
    stop: async () => {
      await current?.stop()
    },
    kill: async () => {
      if (current && !current.hasExited()) await kill(current)
    },
  }
}
