import { invalidRequest, missingParameter, unknownParameter } from './errors'
import type { FormTable, FormValue } from './form-decoding'

/** Reads one parameter of the wire into a typed value, or refuses it with the path in the service's notation. */
export interface Param<T> { parse: (value: FormValue, path: string) => T }

type ParamValue<P> = P extends Param<infer T> ? T : never
type HashValues<F> = { [K in keyof F]?: ParamValue<F[K]> }

/** Metadata limits of PAY-14: 50 keys, names of 40, values of 500 characters. */
export const METADATA_LIMITS = { keys: 50, nameLength: 40, valueLength: 500 } as const

function scalar(value: FormValue, path: string, wanted: string): string {
  if (typeof value !== 'string') throw invalidRequest(`Invalid ${wanted}: ${path}`, { param: path })
  if (value === '') {
    throw invalidRequest(
      `You passed an empty string for '${path}'. It cannot be unset: leave it out or give a value.`,
      { code: 'parameter_invalid_empty', param: path },
    )
  }
  return value
}

interface TextRules { maxLength?: number, pattern?: RegExp, patternMessage?: string, oneOf?: readonly string[] }

/** Text with optional length, pattern and closed set of values. */
export function text(rules: TextRules = {}): Param<string> {
  return {
    parse(value, path) {
      const read = scalar(value, path, 'string')
      if (rules.maxLength !== undefined && read.length > rules.maxLength) {
        throw invalidRequest(`Invalid string: ${path} must be at most ${rules.maxLength} characters.`, { param: path })
      }
      if (rules.oneOf && !rules.oneOf.includes(read)) {
        throw invalidRequest(`Invalid ${path}: must be one of ${rules.oneOf.join(', ')}`, { param: path })
      }
      if (rules.pattern && !rules.pattern.test(read)) {
        throw invalidRequest(rules.patternMessage ?? `Invalid ${path}`, { param: path })
      }
      return read
    },
  }
}

/** An absolute http or https address, kept as it was sent (it may hold a literal placeholder). */
export function url(maxLength = 5000): Param<string> {
  return {
    parse(value, path) {
      const read = scalar(value, path, 'URL')
      const parsed = URL.canParse(read) ? new URL(read) : null
      if (!parsed || !['http:', 'https:'].includes(parsed.protocol) || read.length > maxLength) {
        throw invalidRequest('Not a valid URL', { code: 'url_invalid', param: path })
      }
      return read
    },
  }
}

/** An e-mail address, checked no further than its outline. */
export function email(): Param<string> {
  return {
    parse(value, path) {
      const read = scalar(value, path, 'string')
      if (!/^[^\s@]+@[^\s@]+\.[^\s@]+$/.test(read) || read.length > 512) {
        throw invalidRequest(`Invalid email address: ${read}`, { code: 'email_invalid', param: path })
      }
      return read
    },
  }
}

/** A whole number within optional bounds. */
export function integer(bounds: { min?: number, max?: number } = {}): Param<number> {
  return {
    parse(value, path) {
      const read = scalar(value, path, 'integer')
      if (!/^-?\d{1,15}$/.test(read)) {
        throw invalidRequest(`Invalid integer: ${read}`, { code: 'parameter_invalid_integer', param: path })
      }
      const number = Number(read)
      if (bounds.min !== undefined && number < bounds.min) {
        throw invalidRequest(`Invalid integer: ${path} must be at least ${bounds.min}`, { code: 'parameter_invalid_integer', param: path })
      }
      if (bounds.max !== undefined && number > bounds.max) {
        throw invalidRequest(`Invalid integer: ${path} must be at most ${bounds.max}`, { code: 'parameter_invalid_integer', param: path })
      }
      return number
    },
  }
}

/** `true` or `false`. */
export function bool(): Param<boolean> {
  return {
    parse(value, path) {
      const read = scalar(value, path, 'boolean')
      if (read !== 'true' && read !== 'false') throw invalidRequest(`Invalid boolean: ${read}`, { param: path })
      return read === 'true'
    },
  }
}

/** A list; its positions must run from 0 without a gap. */
export function list<T>(item: Param<T>, maxItems = 100): Param<T[]> {
  return {
    parse(value, path) {
      if (typeof value === 'string') throw invalidRequest('Invalid array', { param: path })
      const keys = Object.keys(value)
      if (keys.length > maxItems) throw invalidRequest(`Invalid array: ${path} takes at most ${maxItems} items`, { param: path })
      return keys.map((_, index) => {
        const part = value[String(index)]
        if (part === undefined) throw invalidRequest('Invalid array', { param: path })
        return item.parse(part, `${path}[${index}]`)
      })
    },
  }
}

/** Named parts; a name that is not listed is refused, a name in `required` must be there. */
export function hash<F extends Record<string, Param<unknown>>>(fields: F, required: readonly (keyof F & string)[] = []): Param<HashValues<F>> {
  return {
    parse(value, path) {
      if (typeof value === 'string') throw invalidRequest('Invalid object', { param: path })
      return parseFields(value, fields, required, key => path === '' ? key : `${path}[${key}]`)
    },
  }
}

function parseFields<F extends Record<string, Param<unknown>>>(
  table: FormTable, fields: F, required: readonly string[], toPath: (key: string) => string,
): HashValues<F> {
  const values: Partial<Record<string, unknown>> = {}
  for (const [key, part] of Object.entries(table)) {
    const field = Object.hasOwn(fields, key) ? fields[key] : undefined
    if (!field) throw unknownParameter(toPath(key))
    values[key] = field.parse(part, toPath(key))
  }
  for (const key of required) {
    if (values[key] === undefined) throw missingParameter(toPath(key))
  }
  // Each value came out of the parser of its own key, which is what HashValues says.
  return values as HashValues<F>
}

/** Reads the parameters of a whole request. */
export function parseParams<F extends Record<string, Param<unknown>>>(table: FormTable, fields: F, required: readonly (keyof F & string)[] = []): HashValues<F> {
  return parseFields(table, fields, required, key => key)
}

/** Metadata: text by name, within the documented limits. An empty value removes its name. */
export function metadata(): Param<Record<string, string>> {
  return {
    parse(value, path) {
      if (value === '') return {}
      if (typeof value === 'string') throw invalidRequest('Invalid object', { param: path })
      const entries = Object.entries(value)
      if (entries.length > METADATA_LIMITS.keys) {
        throw invalidRequest(`You can have at most ${METADATA_LIMITS.keys} metadata keys`, { param: path })
      }
      const read: Record<string, string> = {}
      for (const [name, part] of entries) {
        const partPath = `${path}[${name}]`
        if (typeof part !== 'string') throw invalidRequest('Metadata values must be strings', { param: partPath })
        if (name.length > METADATA_LIMITS.nameLength) {
          throw invalidRequest(`Metadata keys can be up to ${METADATA_LIMITS.nameLength} characters: ${name}`, { param: path })
        }
        if (part.length > METADATA_LIMITS.valueLength) {
          throw invalidRequest(`Metadata values can be up to ${METADATA_LIMITS.valueLength} characters`, { param: partPath })
        }
        if (part !== '') read[name] = part
      }
      return read
    },
  }
}

/** A documented parameter that the fake does not model: refused in words of its own, so that nobody relies on it. */
export function unmodelled(): Param<never> {
  return {
    parse(_value, path) {
      throw invalidRequest(`The payment fake does not model '${path}'.`, { param: path })
    },
  }
}

/** Either one instant or a range of instants (seconds), as list requests filter by `created`. */
export interface CreatedFilter { gt?: number, gte?: number, lt?: number, lte?: number }

/** `created=…` or `created[gte]=…` and the like. */
export function createdFilter(): Param<CreatedFilter> {
  const range = hash({ gt: integer(), gte: integer(), lt: integer(), lte: integer() })
  return {
    parse(value, path) {
      if (typeof value !== 'string') return range.parse(value, path)
      const instant = integer().parse(value, path)
      return { gte: instant, lte: instant }
    },
  }
}

/** The parameters every request may carry to have references answered as whole objects. */
export const expandParam = { expand: list(text(), 100) }

/** The parameters of every list request. */
export const listParams = {
  ...expandParam,
  limit: integer({ min: 1, max: 100 }),
  starting_after: text(),
  ending_before: text(),
}
