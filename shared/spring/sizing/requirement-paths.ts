import type { SpringKind } from '../codes'
import type { DroppableRequirement } from './kind-search'
import type { SizeRequestOf, SpringSizeRequest } from './types'

const FIT_KEYS = ['boreMm', 'rodMm', 'maxFreeLengthMm', 'maxSolidLengthMm'] as const
export type FitKey = (typeof FIT_KEYS)[number]

/** Paths of the limits of the fit. */
export const FIT_PATHS: readonly string[] = FIT_KEYS.map(key => `fit.${key}`)

/** Requirements that any kind may have: the fit, the heat, the life. `changeFit` says what leaving out a limit of the fit means. */
export function listCommonRequirements<K extends SpringKind>(
  request: SizeRequestOf<K>, changeFit: (request: SizeRequestOf<K>, key: FitKey) => SizeRequestOf<K> = withoutFit,
): DroppableRequirement<K>[] {
  const list: DroppableRequirement<K>[] = []
  for (const key of FIT_KEYS) {
    if (request.fit?.[key] !== undefined) list.push({ path: `fit.${key}`, without: r => changeFit(r, key) })
  }
  if (request.temperatureC !== undefined) list.push({ path: 'temperatureC', without: r => ({ ...r, temperatureC: undefined }) })
  if ((request.duty?.cycles ?? 0) > 0) list.push({ path: 'duty.cycles', without: r => ({ ...r, duty: { ...r.duty, cycles: undefined } }) })
  return list
}

/** The request without one limit of its fit. */
export function withoutFit<R extends Pick<SpringSizeRequest, 'fit'>>(request: R, key: FitKey): R {
  return { ...request, fit: { ...request.fit, [key]: undefined } }
}

type Tree = { readonly [key: string]: unknown }
const isTree = (value: unknown): value is Tree => typeof value === 'object' && value !== null

/** Value at a path of numbers, such as `fit.boreMm` or `points.1.forceN`; undefined where there is none. */
export function readNumber(request: SpringSizeRequest, path: string): number | undefined {
  let place: unknown = request
  for (const key of path.split('.')) place = isTree(place) ? place[key] : undefined
  return typeof place === 'number' ? place : undefined
}

/** The request with another value at a path that holds a number. Throws where it holds none. */
export function writeNumber<R extends SpringSizeRequest>(request: R, path: string, value: number): R {
  if (readNumber(request, path) === undefined) throw new Error(`No number at ${path} in a size request`)
  const write = (place: unknown, [key, ...rest]: readonly string[]): unknown => {
    if (key === undefined) return value
    if (Array.isArray(place)) return place.map((item: unknown, i) => (i === Number(key) ? write(item, rest) : item))
    return isTree(place) ? { ...place, [key]: write(place[key], rest) } : place
  }
  return write(request, path.split('.')) as R
}
