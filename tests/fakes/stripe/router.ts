/** One route: method, path with `:name` parts, and what answers it. */
export interface Route<Handler> { method: 'GET' | 'POST', path: string, handler: Handler }

/** A route that fits, with the parts of the path by name. */
export interface RouteMatch<Handler> { handler: Handler, parts: Record<string, string> }

/** The first route for a method and path, or nothing. */
export function matchRoute<Handler>(routes: readonly Route<Handler>[], method: string, path: string): RouteMatch<Handler> | undefined {
  const segments = path.split('/')
  for (const route of routes) {
    const wanted = route.path.split('/')
    if (route.method !== method || wanted.length !== segments.length) continue
    const parts: Record<string, string> = {}
    const isFit = wanted.every((segment, index) => {
      const given = segments[index] ?? ''
      if (!segment.startsWith(':')) return segment === given
      parts[segment.slice(1)] = safeDecode(given)
      return given !== ''
    })
    if (isFit) return { handler: route.handler, parts }
  }
  return undefined
}

function safeDecode(segment: string): string {
  try {
    return decodeURIComponent(segment)
  } catch {
    return segment
  }
}
