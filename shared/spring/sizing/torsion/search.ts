import { bendingStressMpa } from '../../mechanics/torsion/bending'
import { describeTorsion } from '../../mechanics/torsion/evaluate'
import { buildTorsionModel, type TorsionModel } from '../../mechanics/torsion/model'
import {
  activeCoilsOf, bodyLengthAtMm, createTorsionState, fillTorsionState, greatestMomentNmm, torsionMassG, torsionWireLengthMm, type TorsionState,
} from '../../mechanics/torsion/state'
import { wireMassG } from '../../mechanics/wire-length'
import type { DroppableRequirement, KindSearch, PreparedSearch, WireSpring } from '../kind-search'
import { FIT_PATHS, listCommonRequirements } from '../requirement-paths'
import { STEP_TOLERANCE, isContinuous, stepsNote, stepsOf } from '../steps'
import type { SizingWire, TorsionSizeRequest } from '../types'
import { resolveTorsionTravel } from './travel'
import { bodyConstantMm, feasibleTorsionDiameters, searchTorsionWire } from './wire-search'

function prepare(request: TorsionSizeRequest): PreparedSearch<'torsion'> {
  const travel = resolveTorsionTravel(request)
  const steps = stepsOf(request)
  const { angles: asked } = travel.anglesAt(travel.rateNmmPerDeg)
  const state = createTorsionState(asked.length > 1 ? asked[0] ?? Number.NaN : Number.NaN, asked[asked.length - 1] ?? Number.NaN)
  const modelOf = (wire: SizingWire): TorsionModel => buildTorsionModel(wire, request, { stocked: wire.stocked, surroundings: request.surroundings })
  const fill = (model: TorsionModel, { meanDiameterMm, totalCoils }: WireSpring): { readonly state: TorsionState, readonly angles: readonly number[] } => {
    fillTorsionState(state, model, meanDiameterMm, totalCoils, activeCoilsOf(model, meanDiameterMm, totalCoils))
    const { angles } = travel.anglesAt(state.rateNmmPerDeg)
    state.greatestAngleDeg = angles[angles.length - 1] ?? Number.NaN
    state.leastAngleDeg = angles.length > 1 ? angles[0] ?? Number.NaN : Number.NaN
    return { state, angles }
  }
  return {
    search: (wire, goal) => searchTorsionWire(modelOf(wire), state, travel, goal, steps),
    isFeasible: wire => (isContinuous(steps)
      ? feasibleTorsionDiameters(modelOf(wire), state, travel).length > 0
      : searchTorsionWire(modelOf(wire), state, travel, 'mass', steps).length > 0),
    leastMassG: (wire) => {
      const model = modelOf(wire)
      // The rate may be stiffer by what steps leave, and the wire so much shorter.
      const [first, second] = travel.points
      const spread = first && second ? (first.momentNmm + second.momentNmm) / (second.momentNmm - first.momentNmm) : 1
      const stiffer = isContinuous(steps) ? 1 : 1 + STEP_TOLERANCE * spread
      const body = Math.max(0, bodyConstantMm(model, { ...travel, rateNmmPerDeg: travel.rateNmmPerDeg * stiffer }))
      return wireMassG(model.wireDiameterMm, Math.PI * body + model.legsLengthMm, model.densityKgPerM3) * (1 - 1e-9)
    },
    measure: (wire, spring) => {
      const model = modelOf(wire)
      fill(model, spring)
      return {
        ...spring,
        freeLengthMm: bodyLengthAtMm(model, state, 0),
        wireLengthMm: torsionWireLengthMm(model, state),
        massG: torsionMassG(model, state),
        outerDiameterMm: spring.meanDiameterMm + model.wireDiameterMm,
        stressMpa: bendingStressMpa(greatestMomentNmm(state), model.wireDiameterMm),
      }
    },
    describe: (wire, spring) => {
      const model = modelOf(wire)
      const { angles } = fill(model, spring)
      const evaluation = describeTorsion(model, state, angles)
      const notes = [freePlaceNote(request, angles), stepsNote(request, 'Moments')].filter(note => note !== null)
      const { legs, loadOpens, method, temperatureC, duty, shotPeened, preset, toleranceGrade, fit } = request
      return {
        spring: {
          kind: 'torsion', material: wire.material, wireDiameterMm: wire.wireDiameterMm, meanDiameterMm: spring.meanDiameterMm, bodyCoils: spring.totalCoils,
          legs, loadOpens, method, temperatureC, duty, shotPeened, preset, toleranceGrade, fit, points: angles.map(angleDeg => ({ angleDeg })),
        },
        evaluation: { ...evaluation, assumptions: [...evaluation.assumptions, ...notes] },
      }
    },
  }
}

// Angles of the request may be counted from any place; those of the spring are from free.
function freePlaceNote({ points }: TorsionSizeRequest, angles: readonly number[]): string | null {
  const [first] = points
  const [from] = angles
  if (!first || from === undefined) return null
  const freeAt = first.angleDeg - from
  return Math.abs(freeAt) < 0.05 ? null : `Angles are from free, which lies at ${freeAt.toFixed(1)} degrees of those that were asked.`
}

function listRequirements(request: TorsionSizeRequest): DroppableRequirement<'torsion'>[] {
  const list = listCommonRequirements<'torsion'>(request)
  if ((request.legs ?? []).length > 0) list.push({ path: 'legs', without: r => ({ ...r, legs: undefined }) })
  return list
}

/** Torsion springs, as sizing takes them. */
export const TORSION_SEARCH: KindSearch<'torsion'> = {
  kind: 'torsion',
  prepare,
  listRequirements,
  // Of two moments one alone means something else (its angle is from free), so neither can be left out.
  anchorPaths: ({ points, rateNmmPerDeg }) => (points.length > 1 ? ['points.0', 'points.1'] : rateNmmPerDeg === undefined ? ['points.0'] : ['points.0', 'rateNmmPerDeg']),
  changeablePaths: ({ points }) => [
    ...FIT_PATHS, ...points.flatMap((_, i) => [`points.${i}.momentNmm`, `points.${i}.angleDeg`]), 'rateNmmPerDeg', 'temperatureC', 'duty.cycles',
  ],
}
