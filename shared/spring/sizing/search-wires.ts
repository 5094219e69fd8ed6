import { describeSpring } from '../mechanics/compression/evaluate'
import { buildCompressionModel, type CompressionModel } from '../mechanics/compression/model'
import { greatestForceN, fillState, stateWireLengthMm, type CompressionState } from '../mechanics/compression/state'
import { shearStressMpa } from '../mechanics/stress'
import { wireMassG } from '../mechanics/wire-length'
import { searchFixedTravel } from './compression/fixed-travel-search'
import { searchFreeRate } from './compression/free-rate-search'
import { searchStepped } from './compression/stepped-search'
import { STEP_TOLERANCE, resolveTravel, type Travel } from './compression/travel'
import type { CompressionSizeRequest, SizedDesign, SizingCandidate, SizingWire } from './types'
import { createSearchState, type Steps, type WireGoal, type WireSpring } from './compression/wire-search'

/** What is best: the lightest, the least stressed at work, or the least of a number the caller gives a candidate. */
export type SizingObjective<W extends SizingWire> = 'mass' | 'stress' | ((candidate: SizingCandidate<W>) => number)

export interface SearchOptions<W extends SizingWire> {
  readonly objective?: SizingObjective<W> | undefined
  /**
   * How many springs of one wire a caller's objective is asked about, lightest first; 6 unless told. The lightest is nearly
   * always the cheapest of a wire, since wire, coiling and carriage all grow with its length.
   */
  readonly candidatesPerWire?: number | undefined
}

export interface SearchOutcome<W extends SizingWire> {
  readonly designs: readonly SizedDesign<W>[]
  readonly searched: { readonly wires: number, readonly feasibleWires: number }
}

interface Ranked<W extends SizingWire> {
  readonly candidate: SizingCandidate<W>
  readonly value: number
}

const DEFAULT_LIMIT = 5
const DEFAULT_CANDIDATES = 6

/** The best springs over the wires, one for each wire, best first. Pure and deterministic; the request must be checked before. */
export function searchWires<W extends SizingWire>(request: CompressionSizeRequest, wires: readonly W[], options: SearchOptions<W> = {}): SearchOutcome<W> {
  const objective = options.objective ?? 'mass'
  const travel = resolveTravel(request)
  const state = createSearchState(travel)
  const best: Ranked<W>[] = []
  let feasibleWires = 0
  for (const wire of wires) {
    const candidates = candidatesOf(request, travel, wire, state, objective, options.candidatesPerWire ?? DEFAULT_CANDIDATES)
    if (candidates.length === 0) continue
    feasibleWires++
    let bestOfWire: Ranked<W> | null = null
    for (const candidate of candidates) {
      const value = objectiveValue(objective, candidate, travel)
      if (!Number.isFinite(value)) continue
      const ranked = { candidate, value }
      if (!bestOfWire || compareRanked(ranked, bestOfWire) < 0) bestOfWire = ranked
    }
    if (bestOfWire) best.push(bestOfWire)
  }
  best.sort(compareRanked)
  return {
    designs: best.slice(0, request.limit ?? DEFAULT_LIMIT).map(ranked => describeDesign(request, travel, ranked)),
    searched: { wires: wires.length, feasibleWires },
  }
}

/** True where some wire gives a spring; stops at the first. */
export function isFeasible<W extends SizingWire>(request: CompressionSizeRequest, wires: readonly W[]): boolean {
  const travel = resolveTravel(request)
  const state = createSearchState(travel)
  return wires.some((wire) => {
    const model = buildModel(request, wire)
    return springsOf(request, travel, model, state, travel.kind === 'fixed' ? 'stress' : 'mass').length > 0
  })
}

function buildModel(request: CompressionSizeRequest, wire: SizingWire): CompressionModel {
  return buildCompressionModel(wire, request, { stocked: wire.stocked, surroundings: request.surroundings })
}

function springsOf(request: CompressionSizeRequest, travel: Travel, model: CompressionModel, state: CompressionState, goal: WireGoal): WireSpring[] {
  const steps: Steps = { coilStep: request.coilStep ?? Number.NaN, diameterStepMm: request.diameterStepMm ?? Number.NaN }
  if (travel.kind === 'free-rate') return searchFreeRate(model, state, travel, goal, steps)
  const isContinuous = Number.isNaN(steps.coilStep) && Number.isNaN(steps.diameterStepMm)
  return isContinuous ? searchFixedTravel(model, state, travel, goal) : searchStepped(model, state, travel, steps)
}

function candidatesOf<W extends SizingWire>(
  request: CompressionSizeRequest, travel: Travel, wire: W, state: CompressionState, objective: SizingObjective<W>, most: number,
): SizingCandidate<W>[] {
  const model = buildModel(request, wire)
  const goal = typeof objective === 'string' ? objective : 'spread'
  const candidates = springsOf(request, travel, model, state, goal).map(spring => describeCandidate(wire, model, state, spring))
  if (candidates.length <= 1 || goal !== 'spread') return candidates
  return candidates.sort((a, b) => a.massG - b.massG || a.meanDiameterMm - b.meanDiameterMm).slice(0, most)
}

function fill(model: CompressionModel, state: CompressionState, spring: WireSpring): CompressionState {
  return fillState(state, model, spring.meanDiameterMm, spring.activeCoils, spring.totalCoils, spring.freeLengthMm)
}

function describeCandidate<W extends SizingWire>(wire: W, model: CompressionModel, state: CompressionState, spring: WireSpring): SizingCandidate<W> {
  fill(model, state, spring)
  const wireLengthMm = stateWireLengthMm(model, state)
  return {
    wire,
    ...spring,
    rateNPerMm: state.rateNPerMm,
    wireLengthMm,
    massG: wireMassG(model.wireDiameterMm, wireLengthMm, model.densityKgPerM3),
    solidLengthMm: state.solidLengthMm,
    outerDiameterMm: spring.meanDiameterMm + model.wireDiameterMm,
  }
}

// Stress: uncorrected, at the greatest asked load, or when solid where none is asked.
function objectiveValue<W extends SizingWire>(objective: SizingObjective<W>, candidate: SizingCandidate<W>, travel: Travel): number {
  if (objective === 'mass') return candidate.massG
  if (objective === 'stress') {
    const shortest = travel.points[travel.points.length - 1]?.lengthMm ?? candidate.solidLengthMm
    const force = candidate.rateNPerMm * (candidate.freeLengthMm - shortest)
    return shearStressMpa(force, candidate.meanDiameterMm, candidate.wire.wireDiameterMm)
  }
  return objective(candidate)
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

function describeDesign<W extends SizingWire>(request: CompressionSizeRequest, travel: Travel, { candidate, value }: Ranked<W>): SizedDesign<W> {
  const model = buildModel(request, candidate.wire)
  const state = fill(model, createSearchState(travel), candidate)
  const evaluation = describeSpring(model, state, travel.points.map(point => point.lengthMm))
  const note = steppedNote(request, travel, greatestForceN(state))
  return {
    wireId: candidate.wire.id,
    wire: candidate.wire,
    material: candidate.wire.material,
    wireDiameterMm: candidate.wire.wireDiameterMm,
    meanDiameterMm: candidate.meanDiameterMm,
    activeCoils: candidate.activeCoils,
    totalCoils: candidate.totalCoils,
    freeLengthMm: candidate.freeLengthMm,
    objectiveValue: value,
    evaluation: note ? { ...evaluation, assumptions: [...evaluation.assumptions, note] } : evaluation,
  }
}

function steppedNote(request: CompressionSizeRequest, travel: Travel, greatestForce: number): string | null {
  if (travel.kind !== 'fixed' || request.coilStep === undefined || request.diameterStepMm === undefined) return null
  const asked = travel.points.length > 0 && Number.isFinite(greatestForce) ? 'Forces' : 'The rate'
  return `Coils go in steps of ${request.coilStep} and the mean diameter in steps of ${request.diameterStepMm} mm. ${asked} may differ from those asked by up to ${STEP_TOLERANCE * 100} %.`
}
