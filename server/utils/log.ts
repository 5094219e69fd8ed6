type Fields = Readonly<Record<string, string | number | boolean | null | undefined>>

/** Writes one line of JSON. JSON encoding keeps line ends of users inside their string, so that no entry can be forged. */
function write(level: 'info' | 'warn' | 'error', event: string, fields: Fields): void {
  process.stdout.write(`${JSON.stringify({ at: new Date().toISOString(), level, event, ...fields })}\n`)
}

/** Structured log in UTC. Callers give ids and codes, never bodies, tokens, names or addresses. */
export const log = {
  info: (event: string, fields: Fields = {}) => write('info', event, fields),
  warn: (event: string, fields: Fields = {}) => write('warn', event, fields),
  error: (event: string, error: unknown, fields: Fields = {}) => write('error', event, { ...fields, ...describeError(error) }),
}

/** A failed fetch names its whole address: the key of an order or of a link in it is left out. */
const withoutKeys = (text: string): string => text.replace(/([?&]key=|\/link\/)[A-Za-z0-9_-]+/g, '$1:secret')

/** What may be logged of an error: its kind, code and stack; not the statement's parameters, which hold personal data. */
function describeError(error: unknown): Fields {
  if (!(error instanceof Error)) return { error: typeof error }
  const root = error.cause instanceof Error ? error.cause : error
  const code = 'code' in root && typeof root.code === 'string' ? root.code : undefined
  const isQuery = error.message.startsWith('Failed query')
  return { error: root.name, code, message: withoutKeys(isQuery ? root.message : error.message).slice(0, 200), stack: root.stack?.split('\n').slice(1, 6).join(' | ') }
}
