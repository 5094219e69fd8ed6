import type { H3Event } from 'h3'

/** Leaves out what could reach a prototype, and refuses text that is no Unicode (half of a pair), which the database would not store. */
function revive(key: string, value: unknown): unknown {
  if (key === '__proto__') return undefined
  if (typeof value === 'string' && !value.isWellFormed()) throw new SyntaxError('text that is no Unicode')
  return value
}

/**
 * Reads the raw body up to a limit, counting while it streams in.
 * @throws HttpProblem 413 past the limit
 */
export async function readLimitedBody(event: H3Event, maxBytes: number): Promise<Buffer> {
  const tooLarge = () => new HttpProblem(413, `A body of at most ${Math.floor(maxBytes / 1024)} KiB is taken.`)
  if (Number(getRequestHeader(event, 'content-length') ?? 0) > maxBytes) throw tooLarge()
  const chunks: Buffer[] = []
  let size = 0
  for await (const chunk of event.node.req as AsyncIterable<Buffer>) {
    size += chunk.length
    if (size > maxBytes) throw tooLarge()
    chunks.push(chunk)
  }
  return Buffer.concat(chunks)
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
