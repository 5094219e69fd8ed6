/** One line per request: what, how it ended, how long; no address of a person, no body, no secret. */
export default defineNitroPlugin((nitro) => {
  nitro.hooks.hook('afterResponse', (event) => {
    if (event.path.startsWith('/_nuxt/')) return
    log.info('request', {
      requestId: event.context.requestId, method: event.method, path: event.context.routeName, status: getResponseStatus(event),
      ms: Math.round((performance.now() - event.context.startedMs) * 10) / 10, actor: event.context.actorId ?? null,
    })
  })
})
