import { figure } from '../mechanics/figure'
import { readNumber } from './requirement-paths'
import type { LoadPoint, MomentPoint, SizingChange, SizingConflict, SizingWire, SpringSizeRequest } from './types'

const POINT_NAMES = ['first', 'second'] as const

function pointName(request: SpringSizeRequest, index: number): string {
  return request.points.length > 1 ? `${POINT_NAMES[index] ?? `no. ${index + 1}`} ` : ''
}

function pointWords(point: LoadPoint | MomentPoint): string {
  return 'momentNmm' in point
    ? `moment (${figure(point.momentNmm)} N mm at ${figure(point.angleDeg)} degrees)`
    : `load (${figure(point.forceN)} N at ${figure(point.lengthMm)} mm)`
}

const POINT_PARTS: Readonly<Record<string, { readonly word: string, readonly unit: string }>> = {
  forceN: { word: 'force', unit: 'N' }, lengthMm: { word: 'length', unit: 'mm' }, momentNmm: { word: 'moment', unit: 'N mm' }, angleDeg: { word: 'angle', unit: 'degrees' },
}

/** A requirement in words, with its value where it has one. */
function requirementWords(path: string, request: SpringSizeRequest): string {
  const value = readNumber(request, path)
  const shown = value === undefined ? '' : figure(value)
  const point = /^points\.(\d+)$/.exec(path)
  if (point) {
    const index = Number(point[1])
    const asked = request.points[index]
    return asked ? `the ${pointName(request, index)}${pointWords(asked)}` : 'the load'
  }
  switch (path) {
    case 'fit.boreMm': return `the bore of ${shown} mm`
    case 'fit.rodMm': return `the rod of ${shown} mm`
    case 'fit.maxFreeLengthMm': return `the longest free length of ${shown} mm`
    case 'fit.maxSolidLengthMm': return `the longest solid length of ${shown} mm`
    case 'rateNPerMm': return `the rate of ${shown} N/mm`
    case 'rateNmmPerDeg': return `the rate of ${shown} N mm per degree`
    case 'freeLengthMm': return `the free length of ${shown} mm`
    case 'legs': return 'the legs'
    case 'temperatureC': return `the temperature of ${shown} °C`
    case 'duty.cycles': return `the life of ${shown} strokes`
    case 'guided': return 'standing without a guide'
    case 'solidSafe': return 'being safe when pressed solid'
    case 'materials': return 'the materials and wire allowed'
    default: return path
  }
}

/** A change in words: what, to what, from what, and the spring it gives. */
function changeWords<W extends SizingWire>({ path, from, to, design }: SizingChange<W>, request: SpringSizeRequest): string {
  const spring = `then ${figure(design.wireDiameterMm)} mm wire wound to ${figure(design.evaluation.outerDiameterMm)} mm outside does it`
  const was = figure(from)
  const now = figure(to)
  const point = /^points\.(\d+)\.(\w+)$/.exec(path)
  const part = POINT_PARTS[point?.[2] ?? '']
  if (point && part) return `Make the ${pointName(request, Number(point[1]))}${part.word} ${now} ${part.unit} instead of ${was} ${part.unit}: ${spring}.`
  switch (path) {
    case 'fit.boreMm': return `Make the bore ${now} mm instead of ${was} mm: ${spring}.`
    case 'fit.rodMm': return `Make the rod ${now} mm instead of ${was} mm: ${spring}.`
    case 'fit.maxFreeLengthMm': return `Allow a free length of ${now} mm instead of ${was} mm: ${spring}.`
    case 'fit.maxSolidLengthMm': return `Allow a solid length of ${now} mm instead of ${was} mm: ${spring}.`
    case 'rateNPerMm': return `Make the rate ${now} N/mm instead of ${was} N/mm: ${spring}.`
    case 'rateNmmPerDeg': return `Make the rate ${now} N mm per degree instead of ${was}: ${spring}.`
    case 'freeLengthMm': return `Make the free length ${now} mm instead of ${was} mm: ${spring}.`
    case 'temperatureC': return `Keep it to ${now} °C instead of ${was} °C: ${spring}.`
    case 'duty.cycles': return `Ask for a life of at most ${now} strokes instead of ${was}: ${spring}.`
    default: return `Change ${path} from ${was} to ${now}: ${spring}.`
  }
}

function joinWords(words: readonly string[]): string {
  if (words.length <= 1) return words.join('')
  return `${words.slice(0, -1).join(', ')} and ${words[words.length - 1] ?? ''}`
}

/** The conflict in plain sentences: what clashes first, then each change that would give a spring, the least first. */
export function describeConflict<W extends SizingWire>(conflict: SizingConflict<W>, request: SpringSizeRequest): string[] {
  const named = conflict.requirements.map(path => requirementWords(path, request))
  const clash = named.length === 1
    ? `No spring can be made for ${named[0] ?? ''} with the wire there is.`
    : `No spring can be made: ${joinWords(named)} cannot hold together with the wire there is.`
  const remedies = conflict.changes.map(change => changeWords(change, request))
  return remedies.length > 0 ? [clash, ...remedies] : [clash, 'No change of a single number was found that gives a spring: tell us what it is for and a person will look.']
}
