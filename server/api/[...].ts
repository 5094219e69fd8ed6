import routes from '#api-routes'

/** Whatever no other route takes: 405 with the ways there are where only the method is wrong, 404 elsewhere. */
export default defineEventHandler((event) => {
  const path = event.path.split('?')[0]!.replace(/\/$/, '')
  const ways = routes.filter(route => new RegExp(`^${route.path.replace(/:\w+/g, '[^/]+').replace(/\./g, '\\.')}$`).test(path)).map(route => route.method)
  if (ways.length > 0) setResponseHeader(event, 'allow', [...new Set(ways)].join(', '))
  return sendProblem(event, toProblem(ways.length > 0 ? new HttpProblem(405, `This address takes ${ways.join(', ')}.`) : new HttpProblem(404, 'There is nothing at this address.'), event.context.requestId))
})
