import { createServer } from 'node:net'
import { PlainError } from './say.mjs'

/**
 * @typedef {object} ServicePorts
 * @property {number} app
 * @property {number} stripeFake
 * @property {number} smtp
 * @property {number} mailWeb
 * @property {number} postgres
 */

/** @type {ReadonlyArray<{ key: keyof ServicePorts, what: string, variable: string, offset: number }>} */
export const PORT_SETTINGS = [
  { key: 'app', what: 'the app', variable: 'PORT', offset: 0 },
  { key: 'stripeFake', what: 'the Stripe fake', variable: 'WIREWRIGHT_STRIPE_PORT', offset: 1 },
  { key: 'smtp', what: 'incoming mail (SMTP)', variable: 'WIREWRIGHT_SMTP_PORT', offset: 2 },
  { key: 'mailWeb', what: 'the mail inbox page', variable: 'WIREWRIGHT_MAIL_PORT', offset: 3 },
  { key: 'postgres', what: 'PostgreSQL', variable: 'WIREWRIGHT_POSTGRES_PORT', offset: 4 },
]

const DEFAULT_APP_PORT = 3000
const HIGHEST_PORT = 65_535

/**
 * The five ports: the app's from PORT, the others following it unless they have a setting of their own.
 * Throws a PlainError when a setting is no port number or two services would share one.
 * @param {NodeJS.ProcessEnv} environment
 * @returns {ServicePorts}
 */
export function readServicePorts(environment) {
  const appPort = parsePort('PORT', environment.PORT, DEFAULT_APP_PORT)
  /** @type {ServicePorts} */
  const ports = { app: appPort, stripeFake: 0, smtp: 0, mailWeb: 0, postgres: 0 }
  /** @type {Map<number, string>} */
  const ownerOfPort = new Map()
  for (const { key, what, variable, offset } of PORT_SETTINGS) {
    const port = parsePort(variable, environment[variable], appPort + offset)
    const other = ownerOfPort.get(port)
    if (other) throw new PlainError(`Port ${port} is asked for twice: for ${other} and for ${what}. Set ${variable} to another one.`)
    ownerOfPort.set(port, what)
    ports[key] = port
  }
  return ports
}

/**
 * @param {string} variable
 * @param {string | undefined} text
 * @param {number} fallback
 */
function parsePort(variable, text, fallback) {
  const port = text === undefined || text === '' ? fallback : /^\d+$/.test(text) ? Number(text) : Number.NaN
  if (!(port >= 1 && port <= HIGHEST_PORT)) {
    const value = text === undefined || text === '' ? String(fallback) : text
    throw new PlainError(`${variable}=${value} is not a port. Use a whole number from 1 to ${HIGHEST_PORT} (PORT at most ${HIGHEST_PORT - 4}).`)
  }
  return port
}

/**
 * Whether this machine would let us listen there: 'free', 'taken', or 'forbidden' (a port below 1024 without the right).
 * @param {number} port
 * @returns {Promise<'free' | 'taken' | 'forbidden'>}
 */
export function probePort(port) {
  return new Promise((resolve) => {
    const server = createServer()
    server.once('error', (error) => resolve('code' in error && error.code === 'EACCES' ? 'forbidden' : 'taken'))
    server.listen({ port, host: '127.0.0.1', exclusive: true }, () => server.close(() => resolve('free')))
  })
}

/**
 * Throws a PlainError that names every port of the five that cannot be used, and how to choose another.
 * @param {ServicePorts} ports
 */
export async function assertPortsFree(ports) {
  const complaints = []
  for (const { key, what, variable } of PORT_SETTINGS) {
    const state = await probePort(ports[key])
    if (state === 'taken') complaints.push(`Port ${ports[key]}, wanted for ${what}, is taken by another program. Choose another with ${variable}=<port>.`)
    if (state === 'forbidden') complaints.push(`Port ${ports[key]}, wanted for ${what}, may not be used by this user. Choose one above 1023 with ${variable}=<port>.`)
  }
  if (complaints.length === 0) return
  complaints.push('PORT=<port> moves all five: the Stripe fake, SMTP, the mail page and PostgreSQL follow at PORT+1 to PORT+4.')
  throw new PlainError(complaints.join('\n'))
}

/**
 * Five ports nobody uses at the moment, for a throw-away set of services.
 * @returns {Promise<ServicePorts>}
 */
export async function findFreePorts() {
  const [app, stripeFake, smtp, mailWeb, postgres] = await holdFreePorts(PORT_SETTINGS.length)
  return { app: app ?? 0, stripeFake: stripeFake ?? 0, smtp: smtp ?? 0, mailWeb: mailWeb ?? 0, postgres: postgres ?? 0 }
}

/**
 * Distinct free ports: all are held open together, so that the system cannot hand out one twice.
 * @param {number} count
 * @returns {Promise<number[]>}
 */
export async function holdFreePorts(count) {
  const servers = Array.from({ length: count }, () => createServer())
  const ports = await Promise.all(
    servers.map(
      (server) =>
        /** @type {Promise<number>} */ (
          new Promise((resolve, reject) => {
            server.once('error', reject)
            server.listen(0, '127.0.0.1', () => {
              const address = server.address()
              resolve(address !== null && typeof address === 'object' ? address.port : 0)
            })
          })
        ),
    ),
  )
  await Promise.all(servers.map((server) => new Promise((resolve) => server.close(resolve))))
  return ports
}
