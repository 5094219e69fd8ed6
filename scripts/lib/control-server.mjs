import { createServer } from 'node:http'
import { describeFailure } from './say.mjs'

/**
 * @typedef {import('./services.mjs').Service} Service
 * @typedef {import('./services.mjs').ServiceName} ServiceName
 */

const ACTIONS = /** @type {const} */ (['start', 'stop', 'kill', 'restart'])
const MOST_BODY_BYTES = 10_000

/**
 * Lets tests stop, kill and start single services: POST /<service>/<start|stop|kill|restart>, for start and restart with
 * an optional JSON object of environment variables. On loopback, behind a token made for this run. Answers when it is done.
 * @param {Record<ServiceName, Service>} services
 * @param {string} token
 * @returns {Promise<{ url: string, close: () => void }>}
 */
export async function startControlServer(services, token) {
  const server = createServer((request, response) => {
    /** @param {number} status @param {string} [text] */
    const answer = (status, text = '') => response.writeHead(status, { 'content-type': 'text/plain; charset=utf-8' }).end(text)
    if (request.headers.authorization !== `Bearer ${token}`) return answer(401, 'wrong token')
    const [, name = '', action = ''] = (request.url ?? '').split('/')
    const service = Object.hasOwn(services, name) ? services[/** @type {ServiceName} */ (name)] : undefined
    const known = ACTIONS.find((candidate) => candidate === action)
    if (request.method !== 'POST' || !service || !known) return answer(404, 'no such service or action')
    readJson(request)
      .then((env) => act(service, known, env))
      .then(() => answer(204), (failure) => answer(500, describeFailure(failure)))
  })
  await new Promise((resolve, reject) => server.once('error', reject).listen(0, '127.0.0.1', () => resolve(undefined)))
  const address = server.address()
  if (address === null || typeof address === 'string') throw new Error('The control server has no port.')
  return { url: `http://127.0.0.1:${address.port}`, close: () => server.close().closeAllConnections() }
}

/**
 * @param {Service} service
 * @param {typeof ACTIONS[number]} action
 * @param {NodeJS.ProcessEnv | undefined} env
 */
async function act(service, action, env) {
  if (action === 'restart') await service.stop()
  if (action === 'restart' || action === 'start') await service.start(env)
  else await service[action]()
}

/**
 * @param {import('node:http').IncomingMessage} request
 * @returns {Promise<NodeJS.ProcessEnv | undefined>}
 */
async function readJson(request) {
  let text = ''
  for await (const chunk of request) {
    text += chunk
    if (text.length > MOST_BODY_BYTES) throw new Error('The body is too long.')
  }
  return text === '' ? undefined : JSON.parse(text)
}
