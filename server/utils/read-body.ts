import type { H3Event } from 'h3'

/** Leaves out what could reach a prototype, and refuses text that is no Unicode (half of a pair), which the database would not store. */
function revive(key: string, value: unknown): unknown {
  if (key === '__proto__') return undefined
  if (typeof value === 'string' && !value.isWellFormed()) throw new SyntaxError('text that is no Unicode')
  return value
}

/**
 * Reads the raw body up to a limit, counting while it streams in. Past the limit the rest is let run by unread, as long as the server's
 * own time for a request lasts: breaking the connection off at once would often lose the answer on its way.
 * @throws HttpProblem 413 past the limit
 */
export function readLimitedBody(event: H3Event, maxBytes: number): Promise<Buffer> {
  const request = event.node.req
  const tooLarge = () => new HttpProblem(413, `A body of at most ${Math.floor(maxBytes / 1024)} KiB is taken.`)
  if (Number(getRequestHeader(event, 'content-length') ?? 0) > maxBytes) return Promise.reject(tooLarge())
  return new Promise((resolve, reject) => {
    const chunks: Buffer[] = []
    let size = 0
    const collect = (chunk: Buffer) => {
      size += chunk.length
      if (size <= maxBytes) {
        chunks.push(chunk)
        return
      }
      request.off('data', collect)
      request.resume()
      reject(tooLarge())
    }
    request.on('data', collect)
    request.once('end', () => resolve(Buffer.concat(chunks)))
    request.once('error', reject)
    request.once('close', () => reject(new HttpProblem(400, 'The body ended too early.')))
  })
}

/**
 * Reads a JSON body.
 * @throws HttpProblem 415 for another type, 400 for what is no JSON, 413 past the limit
 */
export async function readJsonBody(event: H3Event, maxBytes: number): Promise<unknown> {
  const type = (getRequestHeader(event, 'content-type') ?? '').split(';')[0]!.trim().toLowerCase()
  if (type !== 'application/json') throw new HttpProblem(415, 'Send JSON, with content-type application/json.')
  const raw = await readLimitedBody(event, maxBytes)
  try {
    return JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(raw), revive)
  }
  catch {
    throw new HttpProblem(400, 'The body is not valid JSON.')
  }
}
