import type { Problem } from '#shared/schemas/problem'

/** A refusal in the words the server gave, ready to be shown: one sentence, and one message per wrong field by its dotted path. */
export class SendError extends Error {
  constructor(readonly detail: string, readonly status: number, readonly fieldErrors: Readonly<Record<string, string>> = {}, readonly requestId?: string) {
    super(detail)
    this.name = 'SendError'
  }
}

const NO_NETWORK = 'We could not be reached. What you typed is still here; try again when the connection is back.'

/** Reads problem details out of whatever a request threw. Anything else becomes a sentence of our own. */
export function toSendError(error: unknown): SendError {
  if (error instanceof SendError) return error
  if (!isFetchError(error)) return new SendError('This did not work. Try again.', 0)
  if (!error.response) return new SendError(NO_NETWORK, 0)
  const problem = readProblem(error.data)
  const fieldErrors: Record<string, string> = {}
  for (const { path, message } of problem?.errors ?? []) fieldErrors[path] ??= message
  return new SendError(problem?.detail ?? problem?.title ?? 'This did not work. Try again.', error.response.status, fieldErrors, problem?.requestId)
}

function isFetchError(error: unknown): error is Error & { response?: { status: number }, data?: unknown } {
  return error instanceof Error && error.name === 'FetchError'
}

// Loading Zod for this would cost every page more than the page itself: what has a title is taken for what our own server wrote.
function readProblem(data: unknown): Partial<Problem> | null {
  const value = typeof data === 'string' ? safeParse(data) : data
  return typeof value === 'object' && value !== null && 'title' in value && typeof value.title === 'string' ? value as Partial<Problem> : null
}

function safeParse(text: string): unknown {
  try {
    return JSON.parse(text)
  }
  catch {
    return null
  }
}

export type SendOptions = {
  method?: 'GET' | 'POST' | 'DELETE'
  body?: Record<string, unknown>
  query?: Record<string, string | number | undefined>
  idempotencyKey?: string
  signal?: AbortSignal
}

/** Sends a request as our own page does; throws SendError. An aborted request throws the browser's AbortError. */
export async function send<Answer>(url: string, { method = 'POST', body, query, idempotencyKey, signal }: SendOptions = {}): Promise<Answer> {
  const headers: Record<string, string> = { 'x-wirewright': '1' }
  if (idempotencyKey) headers['idempotency-key'] = idempotencyKey
  try {
    return await $fetch<Answer>(url, { method, body, query, headers, signal, retry: 0 })
  }
  catch (error) {
    if (signal?.aborted) throw new DOMException('The request was given up.', 'AbortError')
    throw toSendError(error)
  }
}
