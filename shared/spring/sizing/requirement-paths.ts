import type { CompressionSizeRequest } from './types'

/** One requirement that can be left out of a request. */
export interface Requirement {
  readonly path: string
  readonly without: (request: CompressionSizeRequest) => CompressionSizeRequest
}

const FIT_KEYS = ['boreMm', 'rodMm', 'maxFreeLengthMm', 'maxSolidLengthMm'] as const
export type FitKey = (typeof FIT_KEYS)[number]

function withoutFit(key: FitKey): Requirement {
  return {
    path: `fit.${key}`,
    // A bore or a rod also guides: leaving it out must not leave the spring free to buckle.
    without: (request) => {
      const guides = (key === 'boreMm' || key === 'rodMm') && request.fit?.[key] !== undefined
      return { ...request, guided: request.guided || guides, fit: { ...request.fit, [key]: undefined } }
    },
  }
}

/** The requirements of a request that can be dropped one by one, those of the surroundings first. */
export function listRequirements(request: CompressionSizeRequest): Requirement[] {
  const list: Requirement[] = []
  for (const key of FIT_KEYS) {
    if (request.fit?.[key] !== undefined) list.push(withoutFit(key))
  }
  if (request.temperatureC !== undefined) {
    list.push({ path: 'temperatureC', without: r => ({ ...r, temperatureC: undefined }) })
  }
  if ((request.duty?.cycles ?? 0) > 0) {
    list.push({ path: 'duty.cycles', without: r => ({ ...r, duty: { ...r.duty, cycles: undefined } }) })
  }
  if (!request.guided && request.fit?.boreMm === undefined && request.fit?.rodMm === undefined) {
    list.push({ path: 'guided', without: r => ({ ...r, guided: true }) })
  }
  if (request.solidSafe !== false) {
    list.push({ path: 'solidSafe', without: r => ({ ...r, solidSafe: false }) })
  }
  const [first, second] = request.points
  if (first && second) {
    list.push({ path: 'points.0', without: r => ({ ...r, points: r.points.slice(-1) }) })
    list.push({ path: 'points.1', without: r => ({ ...r, points: r.points.slice(0, 1) }) })
  } else if (first && request.rateNPerMm !== undefined) {
    list.push({ path: 'rateNPerMm', without: r => ({ ...r, rateNPerMm: undefined }) })
  } else if (first && request.freeLengthMm !== undefined) {
    list.push({ path: 'freeLengthMm', without: r => ({ ...r, freeLengthMm: undefined }) })
  }
  return list
}

/** Requirements that hold in every case: what is left to name when all others are dropped. */
export function anchorPaths(request: CompressionSizeRequest): string[] {
  if (request.points.length > 1) return []
  if (request.points.length === 1) return ['points.0']
  return ['rateNPerMm', 'freeLengthMm']
}

/** Value at a path of numbers, such as `fit.boreMm` or `points.1.forceN`; undefined where there is none. */
export function readNumber(request: CompressionSizeRequest, path: string): number | undefined {
  const point = /^points\.(\d+)\.(lengthMm|forceN)$/.exec(path)
  if (point) return request.points[Number(point[1])]?.[point[2] === 'lengthMm' ? 'lengthMm' : 'forceN']
  const fitKey = FIT_KEYS.find(key => path === `fit.${key}`)
  if (fitKey) return request.fit?.[fitKey]
  switch (path) {
    case 'rateNPerMm': return request.rateNPerMm
    case 'freeLengthMm': return request.freeLengthMm
    case 'temperatureC': return request.temperatureC
    case 'duty.cycles': return request.duty?.cycles
    default: return undefined
  }
}

/** The request with another value at a path of numbers. */
export function writeNumber(request: CompressionSizeRequest, path: string, value: number): CompressionSizeRequest {
  const point = /^points\.(\d+)\.(lengthMm|forceN)$/.exec(path)
  if (point) {
    const key = point[2] === 'lengthMm' ? 'lengthMm' : 'forceN'
    return { ...request, points: request.points.map((p, i) => (i === Number(point[1]) ? { ...p, [key]: value } : p)) }
  }
  const fitKey = FIT_KEYS.find(key => path === `fit.${key}`)
  if (fitKey) return { ...request, fit: { ...request.fit, [fitKey]: value } }
  switch (path) {
    case 'rateNPerMm': return { ...request, rateNPerMm: value }
    case 'freeLengthMm': return { ...request, freeLengthMm: value }
    case 'temperatureC': return { ...request, temperatureC: value }
    case 'duty.cycles': return { ...request, duty: { ...request.duty, cycles: value } }
    default: throw new Error(`No number at ${path} in a size request`)
  }
}
