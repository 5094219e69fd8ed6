import type { SpringKind } from '../codes'
import type { PreparedSearch, WireGoal, WireSpring } from './kind-search'
import { searchOf } from './kinds'
import type { SizeRequestOf, SizedDesign, SizedDesignOf, SizingCandidate, SizingWire, SpringSizeRequest } from './types'

/** What is best: the lightest, the least stressed at work, or the least of a number the caller gives a candidate. */
export type SizingObjective<W extends SizingWire> = 'mass' | 'stress' | ((candidate: SizingCandidate<W>) => number)

export interface SearchOptions<W extends SizingWire> {
  /**
   * Mass unless told. A function of the caller must, for one wire, never fall with the mass of the spring (price does not:
   * wire, coiling, furnace and carriage grow with it) where coils and diameter are continuous, since only the lightest spring
   * of a wire is asked about then; in steps every spring that passes is. NaN or Infinity leaves a spring out.
   */
  readonly objective?: SizingObjective<W> | undefined
  /**
   * For a caller's objective: a number that no spring of the wire of at least this mass falls under. With it wires are left out
   * that cannot win.
   */
  readonly leastOfMass?: ((wire: W, massG: number) => number) | undefined
}

export interface SearchOutcome<W extends SizingWire> {
  readonly designs: readonly SizedDesign<W>[]
  readonly searched: { readonly wires: number, readonly feasibleWires: number }
}

interface Ranked<W extends SizingWire> {
  readonly candidate: SizingCandidate<W>
  readonly spring: WireSpring
  readonly value: number
}

const DEFAULT_LIMIT = 5

/** The best springs over the wires, one for each wire, best first. Pure and deterministic; the request must be checked before. */
export function searchWires<W extends SizingWire>(request: SpringSizeRequest, wires: readonly W[], options: SearchOptions<W> = {}): SearchOutcome<W> {
  switch (request.kind) {
    case 'compression': return searchKind('compression', request, wires, options)
    case 'extension': return searchKind('extension', request, wires, options)
    case 'torsion': return searchKind('torsion', request, wires, options)
  }
}

function searchKind<K extends SpringKind, W extends SizingWire>(kind: K, request: SizeRequestOf<K>, wires: readonly W[], options: SearchOptions<W>): SearchOutcome<W> {
  const { objective = 'mass', leastOfMass } = options
  const prepared = searchOf(kind).prepare(request)
  const limit = request.limit ?? DEFAULT_LIMIT
  const boundOf = lowerBoundOf(prepared, objective, leastOfMass)
  // Wires that may win first: once `limit` better springs are known, the rest is only counted.
  const ordered = wires.map(wire => ({ wire, bound: boundOf(wire) })).sort((a, b) => a.bound - b.bound)
  const best: Ranked<W>[] = []
  let feasibleWires = 0
  for (const { wire, bound } of ordered) {
    const worst = best.length < limit ? Infinity : best[best.length - 1]?.value ?? Infinity
    if (bound > worst || bound === Infinity) {
      if (prepared.isFeasible(wire)) feasibleWires++
      continue
    }
    const { springs, found } = bestOfWire(prepared, wire, objective)
    if (springs > 0) feasibleWires++
    if (found) insert(best, found, limit)
  }
  return {
    designs: best.map(ranked => describeDesign(kind, prepared, ranked) as SizedDesign<W>),
    searched: { wires: wires.length, feasibleWires },
  }
}

/** A number that no passing spring of a wire falls under. Bounds are widened by a hair, so that rounding leaves no tie out. */
function lowerBoundOf<K extends SpringKind, W extends SizingWire>(
  prepared: PreparedSearch<K>, objective: SizingObjective<W>, leastOfMass: SearchOptions<W>['leastOfMass'],
): (wire: W) => number {
  const hair = 1 - 1e-9
  if (objective === 'mass') return wire => prepared.leastMassG(wire) * hair
  if (typeof objective === 'function' && leastOfMass) {
    return (wire) => {
      const massG = prepared.leastMassG(wire)
      return massG === Infinity ? Infinity : leastOfMass(wire, massG) * hair
    }
  }
  return () => -Infinity
}

function bestOfWire<K extends SpringKind, W extends SizingWire>(prepared: PreparedSearch<K>, wire: W, objective: SizingObjective<W>): { springs: number, found: Ranked<W> | null } {
  const goal: WireGoal = typeof objective === 'string' ? objective : 'every'
  const springs = prepared.search(wire, goal)
  let found: Ranked<W> | null = null
  for (const spring of springs) {
    const { meanDiameterMm, activeCoils, totalCoils, freeLengthMm, wireLengthMm, massG, outerDiameterMm, initialTensionN, stressMpa } = prepared.measure(wire, spring)
    // Field by field: copies of objects by spreading take longer than the arithmetic.
    const candidate = { wire, meanDiameterMm, activeCoils, totalCoils, freeLengthMm, wireLengthMm, massG, outerDiameterMm, initialTensionN }
    const value = objective === 'mass' ? massG : objective === 'stress' ? stressMpa : objective(candidate)
    if (!Number.isFinite(value)) continue
    const ranked = { candidate, spring, value }
    if (!found || compareRanked(ranked, found) < 0) found = ranked
  }
  return { springs: springs.length, found }
}

function insert<W extends SizingWire>(best: Ranked<W>[], found: Ranked<W>, limit: number): void {
  const place = best.findIndex(other => compareRanked(found, other) < 0)
  best.splice(place < 0 ? best.length : place, 0, found)
  if (best.length > limit) best.pop()
}

const compareText = (a: string, b: string) => (a < b ? -1 : a > b ? 1 : 0)

// Equal objectives are settled by mass, then material, wire and product, so that the order never depends on chance.
function compareRanked<W extends SizingWire>(a: Ranked<W>, b: Ranked<W>): number {
  return a.value - b.value
    || a.candidate.massG - b.candidate.massG
    || compareText(a.candidate.wire.material, b.candidate.wire.material)
    || a.candidate.wire.wireDiameterMm - b.candidate.wire.wireDiameterMm
    || a.candidate.meanDiameterMm - b.candidate.meanDiameterMm
    || compareText(a.candidate.wire.id, b.candidate.wire.id)
}

/** True where some wire gives a spring; stops at the first. */
export function isFeasible(request: SpringSizeRequest, wires: readonly SizingWire[]): boolean {
  switch (request.kind) {
    case 'compression': return wires.some(searchOf('compression').prepare(request).isFeasible)
    case 'extension': return wires.some(searchOf('extension').prepare(request).isFeasible)
    case 'torsion': return wires.some(searchOf('torsion').prepare(request).isFeasible)
  }
}

function describeDesign<K extends SpringKind, W extends SizingWire>(kind: K, prepared: PreparedSearch<K>, { candidate, spring, value }: Ranked<W>): SizedDesignOf<K, W> {
  const { wire, meanDiameterMm, activeCoils, totalCoils, freeLengthMm } = candidate
  return {
    kind, wireId: wire.id, wire, material: wire.material, wireDiameterMm: wire.wireDiameterMm, meanDiameterMm, activeCoils, totalCoils, freeLengthMm,
    objectiveValue: value, ...prepared.describe(wire, spring),
  }
}
