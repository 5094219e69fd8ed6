import type { SpringKind, ToleranceGrade } from '../codes'
import { getMaterial } from '../materials'
import { meanDiameterToleranceMm } from '../mechanics/tolerances/mean-diameter'
import { checkSizeRequirement } from './check-requirement'
import type { DroppableRequirement } from './kind-search'
import { searchOf } from './kinds'
import { FIT_PATHS, readNumber, writeNumber } from './requirement-paths'
import { isFeasible, searchWires, type SearchOptions } from './search-wires'
import { LEAST_INDEX, MOST_INDEX } from './steps'
import type { SizeRequestOf, SizingChange, SizingConflict, SizingWire, SpringSizeRequest } from './types'

/**
 * Why no wire gives a spring: a smallest set of requirements that cannot hold together, and for each single number the
 * least change found that admits a spring, proven by sizing again. The search is in continuous coils and diameters: steps
 * are the shop's, not the customer's, and only move a limit by a little; the changed request is sized in steps.
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

/** Sets are tried by size, so the first that clashes is a smallest; beyond this size a set is thinned out one by one instead. */
const MOST_TRIED = 3

function smallestClashOf<K extends SpringKind>(kind: K, request: SizeRequestOf<K>, wires: readonly SizingWire[]): string[] {
  const { boreMm, rodMm } = request.fit ?? {}
  if (boreMm !== undefined && rodMm !== undefined && !wires.some(wire => fitsBetween(boreMm, rodMm, wire, request.toleranceGrade ?? 2))) {
    return ['fit.boreMm', 'fit.rodMm']
  }
  const search = searchOf(kind)
  const all = search.listRequirements(request)
  const anchors = search.anchorPaths(request)
  const clashes = (kept: readonly DroppableRequirement<K>[]) => !isFeasible(dropAllBut(request, all, kept), wires)
  const isWhole = (kept: readonly DroppableRequirement<K>[]) => anchors.length > 0 || kept.some(({ path }) => path.startsWith('points.'))

  for (let size = 0; size <= MOST_TRIED; size++) {
    const found = firstSubset(all, size, kept => isWhole(kept) && clashes(kept))
    if (found) return [...anchors, ...found.map(({ path }) => path)]
  }
  let kept = all
  for (const requirement of all) {
    const fewer = kept.filter(other => other !== requirement)
    if (isWhole(fewer) && clashes(fewer)) kept = fewer
  }
  return [...anchors, ...kept.map(({ path }) => path)]
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

// Room between bore and rod for one thickness of wire and the diameter tolerance, whatever the load; midway is best.
function fitsBetween(boreMm: number, rodMm: number, wire: SizingWire, grade: ToleranceGrade): boolean {
  const d = wire.wireDiameterMm
  const D = Math.min(Math.max((boreMm + rodMm) / 2, LEAST_INDEX * d), MOST_INDEX * d)
  const tolerance = meanDiameterToleranceMm(D, D / d, grade)
  const slack = Number.isNaN(tolerance) ? 0 : tolerance
  return D + d + slack <= boreMm && D - d - slack >= rodMm
}

function dropAllBut<K extends SpringKind>(request: SizeRequestOf<K>, all: readonly DroppableRequirement<K>[], kept: readonly DroppableRequirement<K>[]): SizeRequestOf<K> {
  return all.reduce((current, requirement) => (kept.includes(requirement) ? current : requirement.without(current)), request)
}

// Steps outward from the asked value, as fractions of it, until a spring is found.
const PROBES = [0.005, 0.02, 0.05, 0.1, 0.2, 0.35, 0.5, 0.75, 1, 2, 4] as const
const REFINEMENTS = 9

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
function thresholds(path: 'temperatureC' | 'duty.cycles', wires: readonly SizingWire[]): number[] {
  if (path === 'duty.cycles') return [99_999, 10_000]
  const limits = new Set(wires.map(wire => getMaterial(wire.material).temperatureLimitC.value))
  return [...limits].sort((a, b) => b - a)
}
