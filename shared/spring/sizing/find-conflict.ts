import type { ToleranceGrade } from '../codes'
import { getMaterial } from '../materials'
import { meanDiameterToleranceMm } from '../mechanics/tolerances/mean-diameter'
import { checkSizeRequirement } from './check-requirement'
import { anchorPaths, listRequirements, readNumber, writeNumber, type Requirement } from './requirement-paths'
import { isFeasible, searchWires, type SearchOptions } from './search-wires'
import type { CompressionSizeRequest, SizingChange, SizingConflict, SizingWire } from './types'
import { LEAST_INDEX, MOST_INDEX } from './compression/wire-search'

/**
 * Why no wire gives a spring: a set of requirements that cannot hold together although any smaller part of it can, and for
 * each single number the least change found that admits a spring, proven by sizing again.
 */
export function findConflict<W extends SizingWire>(request: CompressionSizeRequest, wires: readonly W[], options: SearchOptions<W> = {}): SizingConflict<W> {
  if (wires.length === 0) return { requirements: ['materials'], changes: [] }
  return { requirements: smallestClash(request, wires), changes: findChanges(request, wires, options) }
}

function smallestClash<W extends SizingWire>(request: CompressionSizeRequest, wires: readonly W[]): string[] {
  const { boreMm, rodMm } = request.fit ?? {}
  if (boreMm !== undefined && rodMm !== undefined && !wires.some(wire => fitsBetween(boreMm, rodMm, wire, request.toleranceGrade ?? 2))) {
    return ['fit.boreMm', 'fit.rodMm']
  }
  const all = listRequirements(request)
  const clashes = (kept: readonly Requirement[]) => !isFeasible(dropAllBut(request, all, kept), wires)
  // Pairs of anchor and one requirement are the plainest answers: look for them first.
  if (request.points.length === 1) {
    const single = all.find(requirement => clashes([requirement]))
    if (single) return [...anchorPaths(request), single.path]
  }
  let kept = all
  for (const requirement of all) {
    if (isLastPoint(requirement, kept, request)) continue
    const fewer = kept.filter(other => other !== requirement)
    if (clashes(fewer)) kept = fewer
  }
  return [...anchorPaths(request), ...kept.map(requirement => requirement.path)]
}

// Room between bore and rod for one thickness of wire and the diameter tolerance, whatever the load; midway is best.
function fitsBetween(boreMm: number, rodMm: number, wire: SizingWire, grade: ToleranceGrade): boolean {
  const d = wire.wireDiameterMm
  const D = Math.min(Math.max((boreMm + rodMm) / 2, LEAST_INDEX * d), MOST_INDEX * d)
  const tolerance = meanDiameterToleranceMm(D, D / d, grade)
  const slack = Number.isNaN(tolerance) ? 0 : tolerance
  return D + d + slack <= boreMm && D - d - slack >= rodMm
}

function dropAllBut(request: CompressionSizeRequest, all: readonly Requirement[], kept: readonly Requirement[]): CompressionSizeRequest {
  return all.reduce((current, requirement) => (kept.includes(requirement) ? current : requirement.without(current)), request)
}

// Of two points one must stay, or nothing is left to size.
function isLastPoint(requirement: Requirement, kept: readonly Requirement[], request: CompressionSizeRequest): boolean {
  if (request.points.length < 2 || !requirement.path.startsWith('points.')) return false
  return kept.filter(other => other.path.startsWith('points.')).length < 2
}

// Direction in which a limit of the fit gives way.
const FIT_WIDENS: Readonly<Record<string, 1 | -1>> = {
  'fit.boreMm': 1, 'fit.rodMm': -1, 'fit.maxFreeLengthMm': 1, 'fit.maxSolidLengthMm': 1,
}
// Steps outward from the asked value, as fractions of it, until a spring is found.
const PROBES = [0.02, 0.05, 0.1, 0.2, 0.35, 0.5, 0.75, 1, 2, 4] as const
const REFINEMENTS = 7

function findChanges<W extends SizingWire>(request: CompressionSizeRequest, wires: readonly W[], options: SearchOptions<W>): SizingChange<W>[] {
  const changes: SizingChange<W>[] = []
  for (const path of changeablePaths(request)) {
    const from = readNumber(request, path)
    if (from === undefined) continue
    const to = leastChange(request, wires, path, from)
    if (to === null) continue
    const [design] = searchWires({ ...writeNumber(request, path, to), limit: 1 }, wires, options).designs
    if (design) changes.push({ path, from, to, design })
  }
  const relative = (change: SizingChange<W>) => Math.abs(change.to - change.from) / Math.abs(change.from)
  return changes.sort((a, b) => relative(a) - relative(b))
}

function changeablePaths(request: CompressionSizeRequest): string[] {
  return [
    ...Object.keys(FIT_WIDENS),
    ...request.points.flatMap((_, i) => [`points.${i}.forceN`, `points.${i}.lengthMm`]),
    'rateNPerMm', 'freeLengthMm', 'temperatureC', 'duty.cycles',
  ]
}

function leastChange<W extends SizingWire>(request: CompressionSizeRequest, wires: readonly W[], path: string, from: number): number | null {
  const works = (value: number) => {
    const changed = writeNumber(request, path, value)
    return checkSizeRequirement(changed).length === 0 && isFeasible(changed, wires)
  }
  if (path === 'temperatureC' || path === 'duty.cycles') {
    return thresholds(path, wires).filter(value => value < from).find(works) ?? null
  }
  const way = FIT_WIDENS[path]
  const ways = way === undefined ? ([1, -1] as const) : [way]
  let failing = new Map<1 | -1, number>(ways.map(w => [w, from]))
  for (const fraction of PROBES) {
    for (const w of ways) {
      const value = from * (1 + w * fraction)
      if (value <= 0) continue
      if (works(value)) return refine(works, failing.get(w) ?? from, value)
      failing = new Map(failing).set(w, value)
    }
  }
  return null
}

// The value is rounded away from the asked one to three figures or so, and must still work.
function refine(works: (value: number) => boolean, failing: number, working: number): number {
  let bad = failing
  let good = working
  for (let i = 0; i < REFINEMENTS; i++) {
    const middle = (bad + good) / 2
    if (works(middle)) good = middle
    else bad = middle
  }
  const step = 10 ** (Math.floor(Math.log10(Math.abs(good))) - 2)
  const outward = (good > bad ? Math.ceil(good / step) : Math.floor(good / step)) * step
  const rounded = Number(outward.toPrecision(6))
  return works(rounded) ? rounded : good
}

// Heat stops at the limits of the materials; life stops only where fatigue or the dynamic gaps begin.
function thresholds<W extends SizingWire>(path: 'temperatureC' | 'duty.cycles', wires: readonly W[]): number[] {
  if (path === 'duty.cycles') return [99_999, 10_000]
  const limits = new Set(wires.map(wire => getMaterial(wire.material).temperatureLimitC.value))
  return [...limits].sort((a, b) => b - a)
}
