import { invalidRequest } from './errors'

/** A decoded form: text, or a table of named or numbered parts. Arrays are tables with the keys 0, 1, 2 … */
export type FormValue = string | FormTable
export interface FormTable { [key: string]: FormValue }

const MAX_DEPTH = 8
const MAX_FIELDS = 2000

/** An empty table without a prototype, so that no key of a request can reach one. */
export function emptyTable(): FormTable {
  return Object.create(null) as FormTable
}

function splitKey(rawKey: string): string[] {
  const match = /^([^[\]]+)((?:\[[^[\]]*\])*)$/.exec(rawKey)
  if (!match?.[1]) throw invalidRequest(`Invalid parameter name: ${rawKey}`, { param: rawKey })
  const parts = [match[1], ...[...(match[2] ?? '').matchAll(/\[([^[\]]*)\]/g)].map(part => part[1] ?? '')]
  if (parts.length > MAX_DEPTH) throw invalidRequest(`Parameter is nested too deeply: ${rawKey}`, { param: rawKey })
  return parts
}

/**
 * Decodes `application/x-www-form-urlencoded` text with brackets (`a[b][0]=c`, `a[]=c`) into nested tables.
 * Refuses with 400 when one name is used both as a value and as a table.
 */
export function decodeForm(encoded: string): FormTable {
  const root = emptyTable()
  let fields = 0
  for (const [rawKey, value] of new URLSearchParams(encoded)) {
    if (++fields > MAX_FIELDS) throw invalidRequest('Too many parameters.')
    const parts = splitKey(rawKey)
    let table = root
    for (const [depth, part] of parts.entries()) {
      const key = part === '' ? String(Object.keys(table).length) : part
      const isLast = depth === parts.length - 1
      const present = table[key]
      if (isLast) {
        if (typeof present === 'object') throw invalidRequest(`Invalid mix of value and object: ${rawKey}`, { param: rawKey })
        table[key] = value
      } else {
        if (typeof present === 'string') throw invalidRequest(`Invalid mix of value and object: ${rawKey}`, { param: rawKey })
        table = table[key] = present ?? emptyTable()
      }
    }
  }
  return root
}

/** The same text for the same parameters, whatever their order: what an idempotency key is compared by. */
export function canonicalForm(value: FormValue): string {
  if (typeof value === 'string') return JSON.stringify(value)
  const parts = Object.keys(value).sort().map(key => `${JSON.stringify(key)}:${canonicalForm(value[key] ?? '')}`)
  return `{${parts.join(',')}}`
}
