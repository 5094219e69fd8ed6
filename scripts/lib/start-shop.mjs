import { join } from 'node:path'
import { APP_ENTRY, ensureBuilt } from './build-stamp.mjs'
import { ensureNpmPackages } from './npm-packages.mjs'
import { assertPortsFree } from './ports.mjs'
import { readClusterVersion, stopForgottenServer } from './postgres-cluster.mjs'
import { resolveClusterFolder } from './postgres-place.mjs'
import { ensurePostgresPrograms } from './postgres-programs.mjs'
import { stopForgottenProcesses } from './processes.mjs'
import { DATA_FOLDER } from './project.mjs'
import { readOrMakeSecrets } from './secrets.mjs'
import { defineServices, prepareDatabase } from './services.mjs'
import { say } from './say.mjs'

/** Names the processes of a running start, for the next one to find after a kill -9. */
export const RECORD_FILE = join(DATA_FOLDER, 'processes.json')

/** @param {string} name */
const logFile = (name) => join(DATA_FOLDER, 'logs', `${name}.log`)

/**
 * Brings the demo shop up, step by step, in the order in which each step needs the one before.
 * @param {import('./ports.mjs').ServicePorts} ports
 * @param {import('./processes.mjs').Processes} processes
 * @param {AbortSignal} signal aborted when somebody asks to stop during a long step
 * @returns {Promise<import('./app-env.mjs').Surroundings>}
 */
export async function startShop(ports, processes, signal) {
  await stopForgottenProcesses(RECORD_FILE)
  const clusterFolder = await resolveClusterFolder()
  await stopForgottenServer(clusterFolder)
  await assertPortsFree(ports)
  const programs = await ensurePostgresPrograms(readClusterVersion(clusterFolder), { logFile: logFile('apt-get') })
  await ensureNpmPackages({ logFile: logFile('npm-ci'), signal })

  const secrets = readOrMakeSecrets(join(DATA_FOLDER, 'secrets.json'))
  /** @type {import('./app-env.mjs').Surroundings} */
  const surroundings = {
    mode: 'demo',
    ports,
    secrets,
    stripeStateFile: join(DATA_FOLDER, 'stripe-fake.json'),
    mailFolder: join(DATA_FOLDER, 'mail'),
    demoSignInsFile: join(DATA_FOLDER, 'demo-sign-ins.json'),
  }
  const cluster = { folder: clusterFolder, programs, port: ports.postgres, adminPassword: secrets.databaseAdminPassword, isThrowAway: false, logFile: logFile('postgres') }
  const context = { surroundings, cluster, processes, logFile, signal }
  await ensureBuilt({ logFile: logFile('build'), signal, report: say })
  say('Starting the database ...')
  const postgres = await prepareDatabase(context)
  say(`Starting the Stripe fake, the mail inbox and the app (${APP_ENTRY.replace(`${join(DATA_FOLDER, '..')}/`, '')}) ...`)
  const { services } = await defineServices(context, postgres)
  for (const name of /** @type {const} */ (['stripe-fake', 'mail', 'app'])) {
    signal.throwIfAborted()
    await services[name].start()
  }
  return surroundings
}
