import { describeExtension } from '../../mechanics/extension/evaluate'
import { buildExtensionModel, type ExtensionModel } from '../../mechanics/extension/model'
import {
  createExtensionState, extensionMassG, extensionWireLengthMm, greatestExtensionForceN, type ExtensionState,
} from '../../mechanics/extension/state'
import { shearStressMpa } from '../../mechanics/stress'
import type { DroppableRequirement, KindSearch, PreparedSearch, WireSpring } from '../kind-search'
import { FIT_PATHS, listCommonRequirements } from '../requirement-paths'
import { stepsNote, stepsOf } from '../steps'
import type { ExtensionSizeRequest, SizingWire } from '../types'
import { fillExtension, resolveExtensionTravel, steppedAnchorN, stiffness, type ExtensionTravel } from './geometry'
import { leastExtensionMassG, searchExtensionWire } from './wire-search'

function createSearchState({ points }: ExtensionTravel): ExtensionState {
  const [first] = points
  const last = points[points.length - 1]
  return createExtensionState(points.length > 1 && first ? first.lengthMm : Number.NaN, last?.lengthMm ?? Number.NaN)
}

function prepare(request: ExtensionSizeRequest): PreparedSearch<'extension'> {
  const travel = resolveExtensionTravel(request)
  const steps = stepsOf(request)
  const state = createSearchState(travel)
  const modelOf = (wire: SizingWire): ExtensionModel => buildExtensionModel(wire, request, { stocked: wire.stocked, surroundings: request.surroundings })
  const fill = (model: ExtensionModel, { meanDiameterMm: D, totalCoils }: WireSpring): ExtensionState => {
    const rate = stiffness(model) / (D * D * D * (totalCoils + model.hookCoils))
    return fillExtension(model, state, travel, D, totalCoils, steppedAnchorN(travel, rate).forceN)
  }
  return {
    search: (wire, goal) => searchExtensionWire(modelOf(wire), state, travel, goal, steps),
    isFeasible: wire => searchExtensionWire(modelOf(wire), state, travel, 'stress', steps).length > 0,
    leastMassG: wire => leastExtensionMassG(modelOf(wire), state, travel, steps),
    measure: (wire, spring) => {
      const model = modelOf(wire)
      fill(model, spring)
      return {
        ...spring,
        wireLengthMm: extensionWireLengthMm(model, state),
        massG: extensionMassG(model, state),
        outerDiameterMm: spring.meanDiameterMm + model.wireDiameterMm,
        initialTensionN: state.initialTensionN,
        stressMpa: shearStressMpa(greatestExtensionForceN(state), spring.meanDiameterMm, model.wireDiameterMm),
      }
    },
    describe: (wire, spring) => {
      const model = modelOf(wire)
      const evaluation = describeExtension(model, fill(model, spring), travel.points.map(point => point.lengthMm))
      const note = stepsNote(request, 'Forces')
      const { hook, method, temperatureC, duty, shotPeened, preset, toleranceGrade, fit } = request
      return {
        spring: {
          kind: 'extension', material: wire.material, wireDiameterMm: wire.wireDiameterMm, meanDiameterMm: spring.meanDiameterMm,
          bodyCoils: spring.totalCoils, initialTensionN: Math.max(0, evaluation.initialTensionN), insideHooksFreeLengthMm: spring.freeLengthMm,
          hook: hook ?? { form: 'full-loop' }, method, temperatureC, duty, shotPeened, preset, toleranceGrade, fit,
          points: travel.points.map(({ lengthMm }) => ({ lengthMm })),
        },
        evaluation: note ? { ...evaluation, assumptions: [...evaluation.assumptions, note] } : evaluation,
      }
    },
  }
}

function listRequirements(request: ExtensionSizeRequest): DroppableRequirement<'extension'>[] {
  const list = listCommonRequirements<'extension'>(request)
  const [first, second] = request.points
  if (first && second) {
    list.push({ path: 'points.0', without: r => ({ ...r, points: r.points.slice(-1) }) })
    list.push({ path: 'points.1', without: r => ({ ...r, points: r.points.slice(0, 1) }) })
  } else if (request.rateNPerMm !== undefined) {
    list.push({ path: 'rateNPerMm', without: r => ({ ...r, rateNPerMm: undefined }) })
  } else if (request.freeLengthMm !== undefined) {
    list.push({ path: 'freeLengthMm', without: r => ({ ...r, freeLengthMm: undefined }) })
  }
  return list
}

/** Extension springs, as sizing takes them. */
export const EXTENSION_SEARCH: KindSearch<'extension'> = {
  kind: 'extension',
  prepare,
  listRequirements,
  anchorPaths: ({ points }) => (points.length > 1 ? [] : ['points.0']),
  changeablePaths: ({ points }) => [
    ...FIT_PATHS, ...points.flatMap((_, i) => [`points.${i}.forceN`, `points.${i}.lengthMm`]), 'rateNPerMm', 'freeLengthMm', 'temperatureC', 'duty.cycles',
  ],
}
