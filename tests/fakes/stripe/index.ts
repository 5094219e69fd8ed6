import { createServer } from 'node:http'
import type { IncomingMessage, Server, ServerResponse } from 'node:http'
import type { AddressInfo } from 'node:net'
import { answerApi, BROKEN_CONNECTION } from './api'
import { resolveOptions } from './config'
import type { StripeFakeOptions } from './config'
import { answerControl } from './control/answer'
import { FakeApiError } from './errors'
import { createFake } from './fake'
import type { Fake } from './fake'
import { decodeForm } from './form-decoding'
import { isLocalHost, jsonAnswer, readBody, sendAnswer } from './http'
import type { HttpAnswer } from './http'
import { answerPage } from './pages/routes'

export type { StripeFakeOptions } from './config'
export { API_VERSION } from './config'

/** A fake that is listening. */
export interface RunningStripeFake {
  /** Base address, `http://127.0.0.1:<port>`. */
  url: string
  host: string
  port: number
  secretKey: string
  webhookSecrets: readonly string[]
  /** The inside, for tests in the same process; other processes use the control interface. */
  fake: Fake
  /** Stops listening, breaks open connections, writes the state file. */
  close: () => Promise<void>
}

function plain(status: number, message: string): HttpAnswer {
  return jsonAnswer(status, { error: { type: 'invalid_request_error', message } })
}

async function answerRequest(fake: Fake, request: IncomingMessage): Promise<HttpAnswer | typeof BROKEN_CONNECTION> {
  if (!isLocalHost(request.headers.host)) return plain(403, 'The payment fake answers on this machine only.')
  const address = new URL(request.url ?? '/', 'http://127.0.0.1')
  const method = request.method ?? 'GET'
  if (method !== 'GET' && method !== 'POST') return plain(405, `Method ${method} is not served.`)
  const body = method === 'POST' ? await readBody(request) : ''
  if (body === null) return plain(413, 'The body is larger than 1 MiB.')
  if (address.pathname.startsWith('/_fake/')) return answerControl(fake, request, address, body)
  if (address.pathname.startsWith('/c/')) return answerPage(fake, method, address.pathname, decodeForm(body))
  fake.scheduler.sweep()
  return answerApi(fake, request, address, body)
}

function handle(fake: Fake, request: IncomingMessage, response: ServerResponse): void {
  answerRequest(fake, request).then((answer) => {
    if (answer === BROKEN_CONNECTION) request.socket.destroy()
    else sendAnswer(response, answer)
  }).catch((error: unknown) => {
    if (error instanceof FakeApiError) {
      sendAnswer(response, jsonAnswer(error.status, { error: error.body }))
      return
    }
    fake.options.log(`defect in the payment fake: ${error instanceof Error ? error.stack : String(error)}`)
    sendAnswer(response, plain(500, 'A defect in the payment fake; see its log.'))
  })
}

function listen(server: Server, port: number, host: string): Promise<AddressInfo> {
  return new Promise((resolve, reject) => {
    server.once('error', reject)
    server.listen(port, host, () => {
      const address = server.address()
      if (typeof address === 'object' && address) resolve(address)
      else reject(new Error('The payment fake got no port.'))
    })
  })
}

/** Starts the fake in this process. Rejects when an option would reach beyond this machine or the port is taken. */
export async function startStripeFake(options: StripeFakeOptions = {}): Promise<RunningStripeFake> {
  const resolved = resolveOptions(options)
  const fake = createFake(resolved)
  const server = createServer((request, response) => handle(fake, request, response))
  const { port } = await listen(server, resolved.port, resolved.host)
  fake.baseUrl = `http://${resolved.host}:${port}`
  for (const session of Object.values(fake.state.sessions)) {
    if (session.status === 'open') session.url = `${fake.baseUrl}/c/pay/${session.id}`
  }
  fake.scheduler.start()
  fake.deliveries.resume()
  return {
    url: fake.baseUrl,
    host: resolved.host,
    port,
    secretKey: resolved.secretKey,
    webhookSecrets: resolved.webhookSecrets,
    fake,
    async close() {
      fake.scheduler.stop()
      fake.deliveries.stop()
      const closed = new Promise<void>(resolve => server.close(() => resolve()))
      server.closeAllConnections()
      await closed
      fake.persist()
    },
  }
}
