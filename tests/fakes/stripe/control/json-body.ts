import { invalidRequest } from '../errors'

/** Reads the fields of a JSON body one by one; `done` refuses what nobody asked for. */
export interface BodyReader {
  text: (name: string) => string | undefined
  number: (name: string) => number | undefined
  flag: (name: string) => boolean | undefined
  texts: (name: string) => string[] | undefined
  numbers: (name: string) => number[] | undefined
  object: (name: string) => Record<string, unknown> | undefined
  /** Text out of a closed set. */
  oneOf: <T extends string>(name: string, values: readonly T[]) => T | undefined
  /** Like `oneOf`, but it must be there. */
  required: <T extends string>(name: string, values: readonly T[]) => T
  done: () => void
}

function isObject(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null && !Array.isArray(value)
}

function parseObject(body: string): Record<string, unknown> {
  if (body.trim() === '') return {}
  let value: unknown
  try {
    value = JSON.parse(body)
  } catch {
    throw invalidRequest('The body must be JSON.')
  }
  if (!isObject(value)) throw invalidRequest('The body must be a JSON object.')
  return value
}

/** A reader of a control request's body. Refuses anything of the wrong type with 400 and the field's name. */
export function readJsonBody(body: string): BodyReader {
  const fields = parseObject(body)
  const asked = new Set<string>()
  const read = <T>(name: string, wanted: string, isFit: (value: unknown) => value is T): T | undefined => {
    asked.add(name)
    const value = fields[name]
    if (value === undefined) return undefined
    if (!isFit(value)) throw invalidRequest(`${name} must be ${wanted}.`, { param: name })
    return value
  }
  const reader: BodyReader = {
    text: name => read(name, 'text', value => typeof value === 'string'),
    number: name => read(name, 'a whole number', (value): value is number => Number.isInteger(value)),
    flag: name => read(name, 'true or false', value => typeof value === 'boolean'),
    texts: name => read(name, 'a list of texts', (value): value is string[] => Array.isArray(value) && value.every(item => typeof item === 'string')),
    numbers: name => read(name, 'a list of whole numbers', (value): value is number[] => Array.isArray(value) && value.every(item => Number.isInteger(item))),
    object: name => read(name, 'an object', isObject),
    oneOf: <T extends string>(name: string, values: readonly T[]) =>
      read(name, `one of ${values.join(', ')}`, (value): value is T => values.some(known => known === value)),
    required<T extends string>(name: string, values: readonly T[]): T {
      const value = reader.oneOf(name, values)
      if (value === undefined) throw invalidRequest(`${name} must be one of ${values.join(', ')}.`, { param: name })
      return value
    },
    done() {
      const extra = Object.keys(fields).find(name => !asked.has(name))
      if (extra !== undefined) throw invalidRequest(`There is no field ${extra}.`, { param: extra })
    },
  }
  return reader
}
