import { figure } from '../figure'
import { meanDiameterToleranceMm } from '../tolerances/mean-diameter'
import type { WireModel } from '../wire-model'
import { exceeds, fallsShort, finishCheck, type SpringCheck } from './check'

/** What the diameter tolerance is read by. */
interface Coiled {
  readonly meanDiameterMm: number
  readonly springIndex: number
}

const CLEARANCE_CAUTION = 0.02

const tolerance = (model: WireModel, state: Coiled) => meanDiameterToleranceMm(state.meanDiameterMm, state.springIndex, model.grade)

/** The diameter tolerance of the grade, plus or minus mm; nought where none is published. */
export function knownToleranceMm(model: WireModel, state: Coiled): number {
  const plusMinus = tolerance(model, state)
  return Number.isNaN(plusMinus) ? 0 : plusMinus
}

function toleranceWords(model: WireModel, state: Coiled): string {
  const plusMinus = tolerance(model, state)
  return Number.isNaN(plusMinus) ? 'no diameter tolerance is published for this size' : `diameter tolerance ${figure(plusMinus)} mm (EN 15800 grade ${model.grade})`
}

interface Measure<Model, State> {
  /** mm, with the tolerance. */
  readonly sizeMm: (model: Model, state: State) => number
  /** How it comes to that size, before the tolerance: 'wound down, ' or nothing. */
  readonly how: (model: Model) => string
  /** 'The outside diameter reaches'. */
  readonly what: string
}

/** The greatest outside diameter against the bore. */
export function makeBoreCheck<Model extends WireModel, State extends Coiled>({ sizeMm, how, what }: Measure<Model, State>): SpringCheck<Model, State> {
  const stops = (model: Model, state: State) => exceeds(sizeMm(model, state), model.boreMm)
  return {
    code: 'bore',
    applies: model => !Number.isNaN(model.boreMm),
    stops,
    describe: (model, state) => {
      const outside = sizeMm(model, state)
      const bore = model.boreMm
      const says = `${what} ${figure(outside)} mm (${how(model)}${toleranceWords(model, state)})`
      return finishCheck('bore', { stop: stops(model, state), caution: bore - outside < CLEARANCE_CAUTION * bore || Number.isNaN(tolerance(model, state)) }, outside, bore, {
        stop: `${says} and does not go into the bore of ${figure(bore)} mm.`,
        caution: `${says}: little room in the bore of ${figure(bore)} mm.`,
        pass: `${says} and goes into the bore of ${figure(bore)} mm.`,
      })
    },
  }
}

/** The least inside diameter against the rod. */
export function makeRodCheck<Model extends WireModel, State extends Coiled>({ sizeMm, how, what }: Measure<Model, State>): SpringCheck<Model, State> {
  const stops = (model: Model, state: State) => fallsShort(sizeMm(model, state), model.rodMm)
  return {
    code: 'rod',
    applies: model => !Number.isNaN(model.rodMm),
    stops,
    describe: (model, state) => {
      const inside = sizeMm(model, state)
      const rod = model.rodMm
      const says = `${what} ${figure(inside)} mm (${how(model)}${toleranceWords(model, state)})`
      return finishCheck('rod', { stop: stops(model, state), caution: inside - rod < CLEARANCE_CAUTION * rod || Number.isNaN(tolerance(model, state)) }, inside, rod, {
        stop: `${says} and does not go over the rod of ${figure(rod)} mm.`,
        caution: `${says}: little room over the rod of ${figure(rod)} mm.`,
        pass: `${says} and goes over the rod of ${figure(rod)} mm.`,
      })
    },
  }
}

type LengthLimit = 'maxFreeLengthMm' | 'maxSolidLengthMm'

/** A length against the most that is asked for. `what` is its name and verb: 'The free length is'. */
export function makeLengthCheck<Model extends WireModel, State>(
  code: 'free-length' | 'solid-length', limit: LengthLimit, what: string, lengthMm: (model: Model, state: State) => number,
): SpringCheck<Model, State> {
  const stops = (model: Model, state: State) => exceeds(lengthMm(model, state), model[limit])
  return {
    code,
    applies: model => !Number.isNaN(model[limit]),
    stops,
    describe: (model, state) => {
      const length = lengthMm(model, state)
      const says = `${what} ${figure(length)} mm; at most ${figure(model[limit])} mm is asked for.`
      return finishCheck(code, { stop: stops(model, state), caution: false }, length, model[limit], { stop: says, caution: '', pass: says })
    },
  }
}
