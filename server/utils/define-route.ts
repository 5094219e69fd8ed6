import type { EventHandler, H3Event } from 'h3'
import type { z } from 'zod'
import type { Role } from '#shared/schemas/roles'
import type { ServiceContext } from '../services/context'
import { DomainError } from '../services/errors'
import { takeFromLimit, type Limit } from '../services/limits/take'
import { findActor } from '../services/sessions/find-actor'

type Access = 'public' | 'signed-in' | readonly Role[]

export type RouteOptions<Body extends z.ZodType, Query extends z.ZodType, Params extends z.ZodType> = {
  /** Who may use the route. There is no default: a route without an entry does not compile. */
  access: Access
  body?: Body
  query?: Query
  params?: Params
  /** Requests allowed per address (and, with `byBody`, per value) in a window. */
  limit?: Limit
  maxBodyBytes?: number
  /** Answers with this status instead of 200. */
  status?: number
}
export type RouteInput<Body extends z.ZodType, Query extends z.ZodType, Params extends z.ZodType> = {
  event: H3Event, context: ServiceContext, body: z.output<Body>, query: z.output<Query>, params: z.output<Params>
}

const SAFE = new Set(['GET', 'HEAD'])

/**
 * One way through for every route: origin, session, rights, limit, parse, one service, answer. Whatever is thrown
 * becomes problem details. Forgetting `access` is a type error, so a route fails closed.
 */
export function defineRoute<Body extends z.ZodType, Query extends z.ZodType, Params extends z.ZodType, Result>(
  options: RouteOptions<Body, Query, Params>,
  handle: (input: RouteInput<Body, Query, Params>) => Promise<Result> | Result,
): EventHandler {
  return defineEventHandler(async (event) => {
    const requestId = event.context.requestId
    try {
      if (!SAFE.has(event.method)) assertSameOrigin(event)
      setResponseHeader(event, 'cache-control', 'no-store')
      const settings = useSettings()
      if (options.limit && settings.limits === 'on') await takeFromLimit(useDatabase(), options.limit, clientAddress(event))
      const actor = await findActor(useDatabase(), readSessionCookie(event), new Date())
      event.context.actorId = actor?.personId
      const context: ServiceContext = { db: useDatabase(), now: new Date(), actor, requestId, origin: settings.origin, timeZone: settings.shopTimeZone }
      assertAccess(context, options.access)
      const params = options.params ? parse(options.params, getRouterParams(event, { decode: true }), 'not-found') : undefined
      const query = options.query ? parse(options.query, readQuery(event)) : undefined
      const body = options.body ? parse(options.body, await readJsonBody(event, options.maxBodyBytes ?? 64 * 1024)) : undefined
      const result = await handle({ event, context, body: body as z.output<Body>, query: query as z.output<Query>, params: params as z.output<Params> })
      if (options.status) setResponseStatus(event, options.status)
      return result ?? null
    }
    catch (error) {
      const problem = toProblem(error, requestId)
      if (problem.status === 401 || problem.status === 403 || problem.status === 429)
        log.warn('refused', { requestId, status: problem.status, path: event.context.routeName, actor: event.context.actorId ?? null })
      return sendProblem(event, problem)
    }
  })
}

function assertAccess(context: ServiceContext, access: Access): void {
  if (access === 'public') return
  if (!context.actor) throw new DomainError('unauthenticated', 'Sign in first.')
  if (access !== 'signed-in' && !context.actor.roles.some(role => access.includes(role)))
    throw new DomainError('forbidden', 'Your account does not reach this place.')
}

/** A state change is taken only from our own pages: Sec-Fetch-Site where the browser sends it, else Origin; programs send neither and have no cookie. */
function assertSameOrigin(event: H3Event): void {
  const site = getRequestHeader(event, 'sec-fetch-site')
  const origin = getRequestHeader(event, 'origin')
  const refuse = () => new HttpProblem(403, 'This was sent from another site.')
  if (site && site !== 'same-origin' && site !== 'none') throw refuse()
  if (origin && origin !== new URL(useSettings().origin).origin) throw refuse()
  if (!site && !origin && readSessionCookie(event) && getRequestHeader(event, 'x-wirewright') !== '1') throw refuse()
}

function readQuery(event: H3Event): Record<string, string> {
  const result: Record<string, string> = {}
  const url = new URL(event.path, 'http://local')
  for (const [name, value] of url.searchParams) {
    if (Object.hasOwn(result, name)) throw new HttpProblem(400, `${name.slice(0, 40)} is given twice.`)
    result[name] = value
  }
  return result
}

/** Parses with a schema; the issues become one message per field. A parameter in the path that cannot be right is 404. */
function parse<S extends z.ZodType>(schema: S, value: unknown, otherwise?: 'not-found'): z.output<S> {
  const parsed = schema.safeParse(value)
  if (parsed.success) return parsed.data
  if (otherwise) throw new DomainError('not-found', 'There is nothing at this address.')
  const fields = parsed.error.issues.slice(0, 50).map(issue => ({
    path: issue.path.join('.'),
    message: issue.code === 'unrecognized_keys' ? `Unknown: ${issue.keys.slice(0, 5).map(key => key.slice(0, 40)).join(', ')}.` : issue.message,
  }))
  throw new HttpProblem(422, fields.length === 1 ? fields[0]!.message : `${fields.length} values need another look.`, fields)
}
