import type { Requirement } from '#shared/schemas/enquiry'

/** A field of the order form, by its path in the requirement, with the words for a value in it: "a bore of 12 mm". */
export type FormField = { path: string, label: string, unit: string }
type Fields = Readonly<Record<string, FormField>>

const field = (path: string, label: string, unit: string): FormField => ({ path, label, unit })

const COMMON: Fields = {
  'fit.boreMm': field('boreMm', 'a bore of', 'mm'),
  'fit.rodMm': field('rodMm', 'a rod of', 'mm'),
  'fit.maxFreeLengthMm': field('maxFreeLengthMm', 'a free length of up to', 'mm'),
  'fit.maxSolidLengthMm': field('maxSolidLengthMm', 'room of', 'mm'),
  'temperatureC': field('hottestC', 'at most', '°C'),
  'duty.cycles': field('strokes', 'a life of', 'strokes'),
}

const TWO_LOADS: Fields = {
  'points.0.forceN': field('need.first.forceN', 'a first load of', 'N'),
  'points.0.lengthMm': field('need.first.lengthMm', 'a first length of', 'mm'),
  'points.1.forceN': field('need.second.forceN', 'a second load of', 'N'),
  'points.1.lengthMm': field('need.second.lengthMm', 'a second length of', 'mm'),
}
const ONE_LOAD: Fields = {
  'points.0.forceN': field('need.load.forceN', 'a load of', 'N'),
  'points.0.lengthMm': field('need.load.lengthMm', 'a length of', 'mm'),
}
const ONE_MOMENT: Fields = {
  'points.0.momentNmm': field('need.load.momentNmm', 'a moment of', 'N mm'),
  'points.0.angleDeg': field('need.load.angleDeg', 'an angle of', 'degrees'),
}

/** Paths of a size request to fields of the form, by what the customer said they know. */
const NEED: Readonly<Record<Requirement['need']['knows'], Fields>> = {
  'two-loads': TWO_LOADS,
  'load-and-rate': { ...ONE_LOAD, rateNPerMm: field('need.rateNPerMm', 'a rate of', 'N/mm') },
  'load-and-length': { ...ONE_LOAD, freeLengthMm: field('need.freeLengthMm', 'a free length of', 'mm') },
  // The load there follows from rate and lengths, so no single number of it can be changed alone.
  'rate-and-length': {},
  'two-moments': {
    'points.0.momentNmm': field('need.first.momentNmm', 'a first moment of', 'N mm'),
    'points.0.angleDeg': field('need.first.angleDeg', 'a first angle of', 'degrees'),
    'points.1.momentNmm': field('need.second.momentNmm', 'a second moment of', 'N mm'),
    'points.1.angleDeg': field('need.second.angleDeg', 'a second angle of', 'degrees'),
  },
  'moment-and-rate': { ...ONE_MOMENT, rateNmmPerDeg: field('need.rateNmmPerDeg', 'a rate of', 'N mm per degree') },
  'moment-from-free': ONE_MOMENT,
}

/** The field of the form that a number of the size request was filled in at; undefined where it has none of its own. */
export function formFieldOf({ kind, need }: Pick<Requirement, 'kind' | 'need'>, path: string): FormField | undefined {
  if (kind !== 'compression' && path === 'fit.maxSolidLengthMm') return undefined
  return COMMON[path] ?? NEED[need.knows][path]
}
