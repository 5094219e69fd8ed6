/** Takes the secrets out of links, once they have been handed over: an old row of the outbox opens nothing. */
export function redactLinks(value: unknown): unknown {
  if (typeof value === 'string') return value.replace(/([?&]key=)[A-Za-z0-9_-]+/g, '$1…').replace(/(\/link\/)[A-Za-z0-9_-]+/g, '$1…')
  if (Array.isArray(value)) return value.map(redactLinks)
  if (typeof value === 'object' && value !== null) return Object.fromEntries(Object.entries(value).map(([name, one]) => [name, redactLinks(one)]))
  return value
}
