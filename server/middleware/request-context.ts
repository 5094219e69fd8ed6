import { randomUUID } from 'node:crypto'

/** Gives each request an id for its log lines and its answer. */
export default defineEventHandler((event) => {
  const requestId = randomUUID()
  event.context.requestId = requestId
  event.context.startedMs = performance.now()
  // Secrets stand in some addresses (links of e-mails): only the path's fixed part is logged.
  event.context.routeName = event.path.split('?')[0]!.replace(/[A-Za-z0-9_-]{22,}/g, ':secret').slice(0, 120)
  setResponseHeader(event, 'x-request-id', requestId)
})
