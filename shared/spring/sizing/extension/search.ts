import { describeExtension } from '../../mechanics/extension/evaluate'
import { buildExtensionModel, type ExtensionModel } from '../../mechanics/extension/model'
import {
  createExtensionState, extensionMassG, extensionWireLengthMm, greatestExtensionForceN, initialStressMpa, type ExtensionState,
} from '../../mechanics/extension/state'
import { shearStressMpa } from '../../mechanics/stress'
import type { DroppableRequirement, KindSearch, PreparedSearch, WireSpring } from '../kind-search'
import { FIT_PATHS, listCommonRequirements } from '../requirement-paths'
import { stepsNote, stepsOf } from '../steps'
import type { ExtensionSizeRequest, SizingWire } from '../types'
import { leastWireMassG } from './bounds'
import { fillExtension } from './geometry'
import { resolveExtensionTravel, steppedQuantity, type ExtensionTravel } from './travel'
import { searchExtensionWire } from './wire-search'

function createSearchState({ points }: ExtensionTravel): ExtensionState {
  const [first] = points
  const last = points[points.length - 1]
  return createExtensionState(points.length > 1 && first ? first.lengthMm : Number.NaN, last?.lengthMm ?? Number.NaN)
}

function prepare(request: ExtensionSizeRequest): PreparedSearch<'extension'> {
  const travel = resolveExtensionTravel(request)
  const steps = stepsOf(request)
  const state = createSearchState(travel)
  const models = new Map<SizingWire, ExtensionModel>()
  const modelOf = (wire: SizingWire): ExtensionModel => {
    const known = models.get(wire)
    if (known) return known
    const model = buildExtensionModel(wire, request, { stocked: wire.stocked, surroundings: request.surroundings })
    models.set(wire, model)
    return model
  }
  const fill = (model: ExtensionModel, { meanDiameterMm, totalCoils }: WireSpring): ExtensionState => fillExtension(model, state, travel, meanDiameterMm, totalCoils)
  const notes = describeChoices(request, travel)
  return {
    search: (wire, goal) => searchExtensionWire(modelOf(wire), state, travel, goal, steps),
    isFeasible: wire => searchExtensionWire(modelOf(wire), state, travel, 'any', steps).length > 0,
    leastMassG: wire => leastWireMassG(modelOf(wire), travel),
    measure: (wire, spring) => {
      const model = modelOf(wire)
      fill(model, spring)
      return {
        meanDiameterMm: spring.meanDiameterMm, activeCoils: spring.activeCoils, totalCoils: spring.totalCoils, freeLengthMm: spring.freeLengthMm,
        wireLengthMm: extensionWireLengthMm(model, state),
        massG: extensionMassG(model, state),
        outerDiameterMm: spring.meanDiameterMm + model.wireDiameterMm,
        initialTensionN: state.initialTensionN,
        // At the greatest asked load, or with the initial tension alone where none is asked.
        stressMpa: travel.points.length > 0
          ? shearStressMpa(greatestExtensionForceN(state), spring.meanDiameterMm, model.wireDiameterMm)
          : initialStressMpa(model, state),
      }
    },
    describe: (wire, spring) => {
      const model = modelOf(wire)
      const evaluation = describeExtension(model, fill(model, spring), travel.points.map(point => point.lengthMm))
      const { hook, method, temperatureC, duty, shotPeened, preset, toleranceGrade, fit } = request
      return {
        spring: {
          kind: 'extension', material: wire.material, wireDiameterMm: wire.wireDiameterMm, meanDiameterMm: spring.meanDiameterMm,
          bodyCoils: spring.totalCoils, initialTensionN: Math.max(0, evaluation.initialTensionN), insideHooksFreeLengthMm: spring.freeLengthMm,
          hook: hook ?? { form: 'full-loop' }, method, temperatureC, duty, shotPeened, preset, toleranceGrade, fit,
          points: travel.points.map(({ lengthMm }) => ({ lengthMm })),
        },
        evaluation: notes.length > 0 ? { ...evaluation, assumptions: [...evaluation.assumptions, ...notes] } : evaluation,
      }
    },
  }
}

// What the search chose or let give way, in sentences.
function describeChoices(request: ExtensionSizeRequest, travel: ExtensionTravel): string[] {
  const what = steppedQuantity(travel)
  const stepped = what === null ? null : stepsNote(request, what)
  const notes = stepped === null ? [] : [stepped]
  if (travel.kind !== 'rate-and-length') return notes
  if (stepped === null && travel.lengthTolerance > 0) notes.push(`The rate is met; the free length may differ from that asked by up to ${travel.lengthTolerance * 100} %.`)
  notes.push('No load is asked for: the initial tension is taken in the middle of the sensible range.')
  return notes
}

function listRequirements(request: ExtensionSizeRequest): DroppableRequirement<'extension'>[] {
  const list = listCommonRequirements<'extension'>(request)
  const [first, second] = request.points
  if (first && second) {
    list.push({ path: 'points.0', without: r => ({ ...r, points: r.points.slice(-1) }) })
    list.push({ path: 'points.1', without: r => ({ ...r, points: r.points.slice(0, 1) }) })
  } else if (first && request.rateNPerMm !== undefined) {
    list.push({ path: 'rateNPerMm', without: r => ({ ...r, rateNPerMm: undefined }) })
  } else if (first && request.freeLengthMm !== undefined) {
    list.push({ path: 'freeLengthMm', without: r => ({ ...r, freeLengthMm: undefined }) })
  }
  return list
}

/** Extension springs, as sizing takes them. */
export const EXTENSION_SEARCH: KindSearch<'extension'> = {
  kind: 'extension',
  prepare,
  listRequirements,
  anchorPaths: ({ points }) => points.length > 1 ? [] : points.length === 1 ? ['points.0'] : ['rateNPerMm', 'freeLengthMm'],
  changeablePaths: ({ points }) => [
    ...FIT_PATHS, ...points.flatMap((_, i) => [`points.${i}.forceN`, `points.${i}.lengthMm`]), 'rateNPerMm', 'freeLengthMm', 'temperatureC', 'duty.cycles',
  ],
}
