import { describeSpring } from '../../mechanics/compression/evaluate'
import { buildCompressionModel, type CompressionModel } from '../../mechanics/compression/model'
import { fillState, greatestForceN, stateMassG, stateWireLengthMm, type CompressionState } from '../../mechanics/compression/state'
import { shearStressMpa } from '../../mechanics/stress'
import type { DroppableRequirement, KindSearch, PreparedSearch, WireGoal, WireSpring } from '../kind-search'
import { FIT_PATHS, listCommonRequirements, withoutFit } from '../requirement-paths'
import { isContinuous, stepsNote, stepsOf } from '../steps'
import type { CompressionSizeRequest, SizingWire } from '../types'
import { leastMassFixedG } from './fixed-mass'
import { hasFeasibleDiameter } from './fixed-travel'
import { searchFixedTravel } from './fixed-travel-search'
import { leastMassFreeRateG } from './free-rate'
import { isFreeRateFeasible, searchFreeRate } from './free-rate-search'
import { createSearchState } from './search-state'
import { hasSteppedSpring, searchStepped } from './stepped-search'
import { rateTolerance, resolveTravel, withRate } from './travel'

function prepare(request: CompressionSizeRequest): PreparedSearch<'compression'> {
  const travel = resolveTravel(request)
  const steps = stepsOf(request)
  const state = createSearchState(travel)
  const models = new Map<SizingWire, CompressionModel>()
  const modelOf = (wire: SizingWire): CompressionModel => {
    const known = models.get(wire)
    if (known) return known
    const model = buildCompressionModel(wire, request, { stocked: wire.stocked, surroundings: request.surroundings })
    models.set(wire, model)
    return model
  }
  const fill = (model: CompressionModel, spring: WireSpring): CompressionState =>
    fillState(state, model, spring.meanDiameterMm, spring.activeCoils, spring.totalCoils, spring.freeLengthMm)

  const search = (wire: SizingWire, goal: WireGoal): WireSpring[] => {
    const model = modelOf(wire)
    if (travel.kind === 'free-rate') return searchFreeRate(model, state, travel, goal, steps)
    return isContinuous(steps) ? searchFixedTravel(model, state, travel, goal) : searchStepped(model, state, travel, goal, steps)
  }
  return {
    search,
    isFeasible: (wire) => {
      const model = modelOf(wire)
      if (travel.kind === 'free-rate') return isFreeRateFeasible(model, state, travel, steps)
      return isContinuous(steps) ? hasFeasibleDiameter(model, state, travel) : hasSteppedSpring(model, state, travel, steps)
    },
    leastMassG: (wire) => {
      const model = modelOf(wire)
      if (travel.kind === 'free-rate') return leastMassFreeRateG(model, state, travel)
      // In steps no spring is lighter than with the stiffest rate they leave, which has the fewest coils and the shortest free length.
      return leastMassFixedG(model, state, isContinuous(steps) ? travel : withRate(travel, travel.rateNPerMm * (1 + rateTolerance(travel))))
    },
    measure: (wire, spring) => {
      const model = modelOf(wire)
      fill(model, spring)
      // Uncorrected, at the greatest asked load, or when solid where none is asked.
      const force = travel.points.length > 0 ? greatestForceN(state) : state.solidForceN
      return {
        meanDiameterMm: spring.meanDiameterMm, activeCoils: spring.activeCoils, totalCoils: spring.totalCoils, freeLengthMm: spring.freeLengthMm,
        wireLengthMm: stateWireLengthMm(model, state),
        massG: stateMassG(model, state),
        outerDiameterMm: spring.meanDiameterMm + model.wireDiameterMm,
        stressMpa: shearStressMpa(force, spring.meanDiameterMm, model.wireDiameterMm),
      }
    },
    describe: (wire, spring) => {
      const model = modelOf(wire)
      const evaluation = describeSpring(model, fill(model, spring), travel.points.map(point => point.lengthMm))
      const note = travel.kind === 'fixed' ? stepsNote(request, travel.points.length > 0 ? 'Forces' : 'The rate') : null
      const { ends, seatingCoefficient, guided, solidSafe, method, temperatureC, duty, shotPeened, preset, toleranceGrade, fit } = request
      return {
        spring: {
          kind: 'compression', material: wire.material, wireDiameterMm: wire.wireDiameterMm, meanDiameterMm: spring.meanDiameterMm,
          activeCoils: spring.activeCoils, totalCoils: spring.totalCoils, freeLengthMm: spring.freeLengthMm,
          ends: ends ?? 'closed-ground', seatingCoefficient, guided, solidSafe, method, temperatureC, duty, shotPeened, preset, toleranceGrade, fit,
          points: travel.points.map(({ lengthMm }) => ({ lengthMm })),
        },
        evaluation: note ? { ...evaluation, assumptions: [...evaluation.assumptions, note] } : evaluation,
      }
    },
  }
}

// A bore or a rod also guides: leaving it out must not leave the spring free to buckle.
const withoutFitButGuided: typeof withoutFit<CompressionSizeRequest> = (request, key) => {
  const guides = (key === 'boreMm' || key === 'rodMm') && request.fit?.[key] !== undefined
  return withoutFit({ ...request, guided: request.guided || guides }, key)
}

function listRequirements(request: CompressionSizeRequest): DroppableRequirement<'compression'>[] {
  const list = listCommonRequirements<'compression'>(request, withoutFitButGuided)
  if (!request.guided && request.fit?.boreMm === undefined && request.fit?.rodMm === undefined) {
    list.push({ path: 'guided', without: r => ({ ...r, guided: true }) })
  }
  if (request.solidSafe !== false) list.push({ path: 'solidSafe', without: r => ({ ...r, solidSafe: false }) })
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

/** Compression springs, as sizing takes them. */
export const COMPRESSION_SEARCH: KindSearch<'compression'> = {
  kind: 'compression',
  prepare,
  listRequirements,
  anchorPaths: ({ points }) => points.length > 1 ? [] : points.length === 1 ? ['points.0'] : ['rateNPerMm', 'freeLengthMm'],
  changeablePaths: ({ points }) => [
    ...FIT_PATHS, ...points.flatMap((_, i) => [`points.${i}.forceN`, `points.${i}.lengthMm`]), 'rateNPerMm', 'freeLengthMm', 'temperatureC', 'duty.cycles',
  ],
}
