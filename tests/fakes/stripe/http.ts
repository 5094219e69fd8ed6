import type { IncomingMessage, ServerResponse } from 'node:http'

/** A whole answer, ready to be sent. */
export interface HttpAnswer { status: number, headers: Record<string, string>, body: string }

const MAX_BODY_BYTES = 1024 * 1024

/** The body as text; null when it is larger than 1 MiB: what comes after is thrown away unread. */
export function readBody(request: IncomingMessage): Promise<string | null> {
  return new Promise((resolve, reject) => {
    const chunks: Buffer[] = []
    let bytes = 0
    request.on('data', (chunk: Buffer) => {
      bytes += chunk.length
      if (bytes > MAX_BODY_BYTES) {
        chunks.length = 0
        resolve(null)
      } else {
        chunks.push(chunk)
      }
    })
    request.once('end', () => resolve(Buffer.concat(chunks).toString('utf8')))
    request.once('error', reject)
  })
}

/** Sends an answer with the headers that hold for every one. */
export function sendAnswer(response: ServerResponse, answer: HttpAnswer): void {
  if (response.destroyed) return
  response.writeHead(answer.status, {
    'x-content-type-options': 'nosniff',
    'cache-control': 'no-store',
    ...answer.headers,
    'content-length': Buffer.byteLength(answer.body),
  })
  response.end(answer.body)
}

/** A JSON answer. */
export function jsonAnswer(status: number, value: object, headers: Record<string, string> = {}): HttpAnswer {
  return { status, headers: { 'content-type': 'application/json; charset=utf-8', ...headers }, body: JSON.stringify(value, null, 2) }
}

/** Whether the Host header names this machine: a page elsewhere must not reach the fake under a name of its own. */
export function isLocalHost(hostHeader: string | undefined): boolean {
  return /^(127\.0\.0\.1|localhost)(:\d+)?$/.test(hostHeader ?? '')
}

/** Waits so many milliseconds. */
export function pause(milliseconds: number): Promise<void> {
  return new Promise(resolve => setTimeout(resolve, milliseconds))
}
