import { figure } from '../../mechanics/figure'
import { bendingStressMpa } from '../../mechanics/torsion/bending'
import { describeTorsion } from '../../mechanics/torsion/evaluate'
import { buildTorsionModel, type TorsionModel } from '../../mechanics/torsion/model'
import {
  bodyLengthAtMm, createTorsionState, greatestMomentNmm, torsionMassG, torsionWireLengthMm, type TorsionState,
} from '../../mechanics/torsion/state'
import { wireMassG } from '../../mechanics/wire-length'
import type { DroppableRequirement, KindSearch, PreparedSearch, WireSpring } from '../kind-search'
import { FIT_PATHS, listCommonRequirements } from '../requirement-paths'
import { isContinuous, stepsNote, stepsOf } from '../steps'
import type { SizingWire, TorsionSizeRequest } from '../types'
import { bodyConstantMm, fillTorsion } from './diameters'
import { placedAngles, resolveTorsionTravel } from './travel'
import { searchTorsionWire } from './wire-search'

function prepare(request: TorsionSizeRequest): PreparedSearch<'torsion'> {
  const travel = resolveTorsionTravel(request)
  const steps = stepsOf(request)
  const state = createTorsionState(Number.NaN, Number.NaN)
  const models = new Map<SizingWire, TorsionModel>()
  const modelOf = (wire: SizingWire): TorsionModel => {
    const known = models.get(wire)
    if (known) return known
    const model = buildTorsionModel(wire, request, { stocked: wire.stocked, surroundings: request.surroundings })
    models.set(wire, model)
    return model
  }
  const fill = (model: TorsionModel, { meanDiameterMm, totalCoils }: WireSpring): TorsionState => fillTorsion(model, state, travel, meanDiameterMm, totalCoils)
  // Steps may leave the rate stiffer, and the wire so much shorter.
  const stiffest = travel.rateNmmPerDeg * (isContinuous(steps) ? 1 : 1 + travel.rateTolerance)
  return {
    search: (wire, goal) => searchTorsionWire(modelOf(wire), state, travel, goal, steps),
    isFeasible: wire => searchTorsionWire(modelOf(wire), state, travel, 'any', steps).length > 0,
    leastMassG: (wire) => {
      const model = modelOf(wire)
      const body = Math.max(0, bodyConstantMm(model, stiffest))
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
      const angles = placedAngles(fill(model, spring))
      const evaluation = describeTorsion(model, state, angles)
      const notes = [freePlaceNote(request, angles), legAngleNote(model, spring.totalCoils), stepsNote(request, 'Moments')].filter(note => note !== null)
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

// The angle between the legs is no part of a request, so the coils are chosen freely and it follows from them.
function legAngleNote(model: TorsionModel, bodyCoils: number): string | null {
  if (model.legs.length < 2) return null
  const part = Math.round((bodyCoils - Math.floor(bodyCoils)) * 3600) / 10
  return `No angle between the legs was asked for: ${figure(bodyCoils)} coils put the second leg ${figure(part)} degrees of a turn past the first, unloaded.`
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
