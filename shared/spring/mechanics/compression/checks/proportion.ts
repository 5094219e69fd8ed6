import { figure } from '../../figure'
import { exceeds, fallsShort, finishCheck, type CompressionCheck } from './check'

const always = () => true

export const wireRangeCheck: CompressionCheck = {
  code: 'wire-range',
  applies: always,
  stops: model => model.wireProblem !== null,
  describe: (model) => {
    const { min, max } = model.material.strength.rangeMm
    const d = model.wireDiameterMm
    const basis = `${model.material.standard} data cover ${min} to ${max} mm`
    return finishCheck(
      'wire-range',
      { stop: model.wireProblem !== null, caution: model.context.stocked === false },
      d,
      d < min ? min : max,
      {
        stop: model.wireProblem ?? '',
        caution: `Wire of ${d} mm is covered (${basis}) but not in stock: it must be bought.`,
        pass: `Wire of ${d} mm is covered: ${basis}.`,
      },
    )
  },
}

// Range of the European quality table (EN 15800); the cautions are common practice, no source.
const INDEX = { least: 4, most: 20, easyLeast: 5, easyMost: 15 } as const

export const indexCheck: CompressionCheck = {
  code: 'index',
  applies: always,
  stops: (_, state) => fallsShort(state.springIndex, INDEX.least) || exceeds(state.springIndex, INDEX.most),
  describe: (model, state) => {
    const w = state.springIndex
    const low = w < (INDEX.least + INDEX.most) / 2
    const says = `The index D/d is ${figure(w)}`
    return finishCheck(
      'index',
      { stop: indexCheck.stops(model, state), caution: w < INDEX.easyLeast || w > INDEX.easyMost },
      w,
      low ? INDEX.least : INDEX.most,
      {
        stop: `${says}: cold coiling by EN 15800 needs ${INDEX.least} to ${INDEX.most}.`,
        caution: `${says}: ${low ? 'tight to coil' : 'loose, it tangles and its diameter spreads'}; ${INDEX.easyLeast} to ${INDEX.easyMost} is easier (common practice).`,
        pass: `${says}, within ${INDEX.easyLeast} to ${INDEX.easyMost} (EN 15800 allows ${INDEX.least} to ${INDEX.most}).`,
      },
    )
  },
}

// EN 15800 needs at least 2 active coils; under 3 the end coils weigh too much (common practice, no source).
const LEAST_COILS = 2
const EASY_COILS = 3

export const coilsCheck: CompressionCheck = {
  code: 'coils',
  applies: always,
  stops: (_, state) => fallsShort(state.activeCoils, LEAST_COILS),
  describe: (model, state) => {
    const n = state.activeCoils
    return finishCheck(
      'coils',
      { stop: coilsCheck.stops(model, state), caution: fallsShort(n, EASY_COILS) },
      n,
      LEAST_COILS,
      {
        stop: `${figure(n)} active coils: EN 15800 needs at least ${LEAST_COILS}.`,
        caution: `${figure(n)} active coils: under ${EASY_COILS} the end coils make the rate uncertain (common practice).`,
        pass: `${figure(n)} active coils, at least ${EASY_COILS}.`,
      },
    )
  },
}
