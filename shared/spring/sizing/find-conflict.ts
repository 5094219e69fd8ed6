import type { SpringKind, ToleranceGrade } from '../codes'
import { getMaterial } from '../materials'
import { INDEX_STEPS, MEAN_DIAMETER_STEPS_MM, meanDiameterToleranceMm } from '../mechanics/tolerances/mean-diameter'
import { checkSizeRequirement } from './check-requirement'
import type { DroppableRequirement } from './kind-search'
import { searchOf } from './kinds'
import { FIT_PATHS, readNumber, writeNumber } from './requirement-paths'
import { isFeasible, searchWires, type SearchOptions } from './search-wires'
import { LEAST_INDEX, MOST_INDEX } from './steps'
import type { SizeRequestOf, SizingChange, SizingConflict, SizingWire, SpringSizeRequest } from './types'

/**
 * Why no wire gives a spring: a smallest set of requirements that cannot hold together, and for each single number the
 * least change found that admits a spring, proven by sizing again.
 */
export function findConflict<W extends SizingWire>(request: SpringSizeRequest, wires: readonly W[], options: SearchOptions<W> = {}): SizingConflict<W> {
  if (wires.length === 0) return { requirements: ['materials'], changes: [] }
  return { requirements: smallestClash(request, wires), changes: findChanges(request, wires, options) }
}

function smallestClash(request: SpringSizeRequest, wires: readonly SizingWire[]): string[] {
  switch (request.kind) {
    case 'compression': return smallestClashOf('compression', request, wires)
    case 'extension': return smallestClashOf('extension', request, wires)
    case 'torsion': return smallestClashOf('torsion', request, wires)
  }
}

/**
 * First what clashes whatever the spring must do. Then one requirement after another is left out while the rest still clash,
 * which leaves a set of which every part is needed; and every smaller set is tried, by size, so what is named is a smallest.
 */
function smallestClashOf<K extends SpringKind>(kind: K, request: SizeRequestOf<K>, wires: readonly SizingWire[]): string[] {
  const { temperatureC } = request
  if (temperatureC !== undefined && wires.every(wire => getMaterial(wire.material).temperatureLimitC.value < temperatureC)) return ['temperatureC']
  const { boreMm, rodMm } = request.fit ?? {}
  if (boreMm !== undefined && rodMm !== undefined && !wires.some(wire => fitsBetween(boreMm, rodMm, wire, request.toleranceGrade ?? 2))) {
    return ['fit.boreMm', 'fit.rodMm']
  }
  const search = searchOf(kind)
  const all = search.listRequirements(request)
  const anchors = search.anchorPaths(request)
  // Without a load there is nothing to search for.
  const isWhole = (kept: readonly DroppableRequirement<K>[]) => anchors.length > 0 || kept.some(({ path }) => path.startsWith('points.'))
  const clashes = (kept: readonly DroppableRequirement<K>[]) => isWhole(kept) && !isFeasible(dropAllBut(request, all, kept), wires)

  let least = all
  for (const requirement of all) {
    const fewer = least.filter(other => other !== requirement)
    if (clashes(fewer)) least = fewer
  }
  for (let size = 0; size < least.length; size++) {
    const found = firstSubset(all, size, clashes)
    if (found) least = found
  }
  return [...anchors, ...least.map(({ path }) => path)]
}

// The first subset of a size, in the order of the list, that satisfies.
function firstSubset<T>(list: readonly T[], size: number, satisfies: (subset: readonly T[]) => boolean): readonly T[] | null {
  const choose = (from: number, chosen: readonly T[]): readonly T[] | null => {
    if (chosen.length === size) return satisfies(chosen) ? chosen : null
    for (let i = from; i < list.length; i++) {
      const found = choose(i + 1, [...chosen, list[i] as T])
      if (found) return found
    }
    return null
  }
  return choose(0, [])
}

// Room between bore and rod for one thickness of wire and the diameter tolerance, whatever the load. Between two steps the tolerance is constant.
function fitsBetween(boreMm: number, rodMm: number, { wireDiameterMm: d }: SizingWire, grade: ToleranceGrade): boolean {
  const low = LEAST_INDEX * d
  const high = MOST_INDEX * d
  const steps = [...MEAN_DIAMETER_STEPS_MM, ...INDEX_STEPS.map(w => w * d)].filter(D => D > low && D < high).sort((a, b) => a - b)
  let from = low
  for (const to of [...steps, high]) {
    const middle = (from + to) / 2
    const tolerance = meanDiameterToleranceMm(middle, middle / d, grade)
    const slack = d + (Number.isNaN(tolerance) ? 0 : tolerance)
    if (Math.max(from, rodMm + slack) <= Math.min(to, boreMm - slack)) return true
    from = to
  }
  return false
}

function dropAllBut<K extends SpringKind>(request: SizeRequestOf<K>, all: readonly DroppableRequirement<K>[], kept: readonly DroppableRequirement<K>[]): SizeRequestOf<K> {
  return all.reduce((current, requirement) => (kept.includes(requirement) ? current : requirement.without(current)), request)
}

// Steps outward from the asked value, as fractions of it, until a spring is found.
const PROBES = [0.005, 0.02, 0.05, 0.1, 0.2, 0.35, 0.5, 0.75, 1, 2, 4] as const
const REFINEMENTS = 12
const FIGURES = 4

// A limit of the fit gives way in one direction: the rod gets thinner, the others wider. Anything else may go either way.
function directions(path: string): readonly (1 | -1)[] {
  if (path === 'fit.rodMm') return [-1]
  return FIT_PATHS.includes(path) ? [1] : [1, -1]
}

function findChanges<W extends SizingWire>(request: SpringSizeRequest, wires: readonly W[], options: SearchOptions<W>): SizingChange<W>[] {
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

function changeablePaths(request: SpringSizeRequest): readonly string[] {
  switch (request.kind) {
    case 'compression': return searchOf('compression').changeablePaths(request)
    case 'extension': return searchOf('extension').changeablePaths(request)
    case 'torsion': return searchOf('torsion').changeablePaths(request)
  }
}

function leastChange(request: SpringSizeRequest, wires: readonly SizingWire[], path: string, from: number): number | null {
  const works = (value: number) => {
    const changed = writeNumber(request, path, value)
    return checkSizeRequirement(changed).length === 0 && isFeasible(changed, wires)
  }
  if (path === 'temperatureC' || path === 'duty.cycles') {
    return thresholds(path, wires).filter(value => value < from).find(works) ?? null
  }
  const ways = directions(path)
  const failing = new Map<1 | -1, number>(ways.map(way => [way, from]))
  for (const fraction of PROBES) {
    for (const way of ways) {
      const value = from * (1 + way * fraction)
      if (value <= 0) continue
      if (works(value)) return refine(works, failing.get(way) ?? from, value)
      failing.set(way, value)
    }
  }
  return null
}

// Between a value that fails and one that works lies a limit. Where steps or tolerances make several, one of them is found; what
// is given works in any case. It is rounded away from the asked value to four figures, and must still work.
function refine(works: (value: number) => boolean, failing: number, working: number): number {
  let bad = failing
  let good = working
  for (let i = 0; i < REFINEMENTS; i++) {
    const middle = (bad + good) / 2
    if (works(middle)) good = middle
    else bad = middle
  }
  const step = 10 ** (Math.floor(Math.log10(Math.abs(good))) - FIGURES + 1)
  const outward = (good > bad ? Math.ceil(good / step) : Math.floor(good / step)) * step
  const rounded = Number(outward.toPrecision(6))
  return works(rounded) ? rounded : good
}

// Heat stops at the limits of the materials; life stops only where fatigue or the dynamic gaps begin.
function thresholds(path: 'temperatureC' | 'duty.cycles', wires: readonly SizingWire[]): number[] {
  if (path === 'duty.cycles') return [99_999, 10_000]
  const limits = new Set(wires.map(wire => getMaterial(wire.material).temperatureLimitC.value))
  return [...limits].sort((a, b) => b - a)
}
