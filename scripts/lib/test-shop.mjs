import { randomBytes } from 'node:crypto'
import { mkdirSync, rmSync } from 'node:fs'
import { join } from 'node:path'
import { readDemoSignIns } from './announcement.mjs'
import { siteUrl } from './app-env.mjs'
import { ensureBuilt } from './build-stamp.mjs'
import { startControlServer } from './control-server.mjs'
import { findFreePorts } from './ports.mjs'
import { makeTemporaryFolder } from './postgres-place.mjs'
import { ensurePostgresPrograms } from './postgres-programs.mjs'
import { APP_ROLE, OWNER_ROLE, databaseUrl } from './postgres-roles.mjs'
import { Processes } from './processes.mjs'
import { DATA_FOLDER, makeDataFolder } from './project.mjs'
import { sayOnStandardError } from './say.mjs'
import { makeSecrets } from './secrets.mjs'
import { defineServices, prepareDatabase } from './services.mjs'

/**
 * @typedef {object} TestServices what a test may need to know; the same for vitest and playwright
 * @property {string} baseUrl of the app
 * @property {string} secondAppUrl of a second app process on the same database; not running until a test starts it
 * @property {string} stripeFakeUrl
 * @property {string} stripeSecretKey
 * @property {string} stripeWebhookSecret
 * @property {string} mailUrl the inbox: its API is under /api
 * @property {number} smtpPort where the inbox takes mail
 * @property {string} databaseUrl for the role that runs the app
 * @property {string} databaseOwnerUrl for the role that owns the tables
 * @property {import('./announcement.mjs').DemoSignIn[]} demoSignIns
 * @property {string} logFolder holds app.log, stripe-fake.log, mail.log, postgres.log
 * @property {string} controlUrl see control-server.mjs
 * @property {string} controlToken
 */

/**
 * Starts a throw-away shop on free ports, its data in a temporary folder that `stop` removes.
 * @param {string} suite names the folder of the logs, which are kept
 * @returns {{ ready: Promise<TestServices>, stop: () => Promise<void> }}
 */
export function startTestShop(suite) {
  /** @type {Array<() => unknown>} */
  const undo = []
  const runUndo = async () => {
    for (let step = undo.pop(); step; step = undo.pop()) await step()
  }
  const stopping = new AbortController()
  const { signal } = stopping
  const start = async () => {
    makeDataFolder()
    const logFolder = join(DATA_FOLDER, 'test-logs', suite)
    rmSync(logFolder, { recursive: true, force: true })
    mkdirSync(logFolder, { recursive: true, mode: 0o700 })
    /** @param {string} name */
    const logFile = (name) => join(logFolder, `${name}.log`)
    await ensureBuilt({ logFile: logFile('build'), signal, report: sayOnStandardError })
    const programs = await ensurePostgresPrograms(null, { logFile: logFile('apt-get') })

    const folder = await makeTemporaryFolder()
    undo.push(() => rmSync(folder, { recursive: true, force: true }))
    const secrets = makeSecrets()
    const ports = await findFreePorts()
    /** @type {import('./app-env.mjs').Surroundings} */
    const surroundings = {
      mode: 'test',
      ports,
      secrets,
      stripeStateFile: join(folder, 'stripe-fake.json'),
      mailFolder: join(folder, 'mail'),
      demoSignInsFile: join(folder, 'demo-sign-ins.json'),
    }
    const cluster = { folder: join(folder, 'postgres'), programs, port: ports.postgres, adminPassword: secrets.databaseAdminPassword, isThrowAway: true, logFile: logFile('postgres') }
    const processes = new Processes({
      recordFile: join(folder, 'processes.json'),
      onUnexpectedExit: (name, how, log) => sayOnStandardError(`${name} stopped unexpectedly (${how}): see ${log}`),
    })
    undo.push(() => processes.stopAll())
    const context = { surroundings, cluster, processes, logFile, signal }
    const { services, secondAppUrl } = await defineServices(context, await prepareDatabase(context))
    await Promise.all([services['stripe-fake'].start(), services.mail.start(), services.app.start()])
    const controlToken = randomBytes(24).toString('hex')
    const control = await startControlServer(services, controlToken)
    undo.push(() => control.close())
    return {
      baseUrl: siteUrl(surroundings),
      secondAppUrl,
      stripeFakeUrl: `http://127.0.0.1:${ports.stripeFake}`,
      stripeSecretKey: secrets.stripeSecretKey,
      stripeWebhookSecret: secrets.stripeWebhookSecret,
      mailUrl: `http://127.0.0.1:${ports.mailWeb}`,
      smtpPort: ports.smtp,
      databaseUrl: databaseUrl(ports.postgres, APP_ROLE, secrets.databaseAppPassword),
      databaseOwnerUrl: databaseUrl(ports.postgres, OWNER_ROLE, secrets.databaseOwnerPassword),
      demoSignIns: readDemoSignIns(surroundings.demoSignInsFile),
      logFolder,
      controlUrl: control.url,
      controlToken,
    }
  }
  const ready = start()
  return {
    ready,
    stop: async () => {
      stopping.abort()
      // Twice: a start under way fails once its processes are gone, and leaves a little more to undo.
      await runUndo()
      await ready.catch(() => {})
      await runUndo()
    },
  }
}
