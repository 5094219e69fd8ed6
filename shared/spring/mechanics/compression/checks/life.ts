import { FATIGUE_CYCLES, goodmanZimmerliFactor, lifeFractionFactor } from '../../fatigue'
import { fatigueDataProblem, hasFatigueData, hasLifeFractions, lifeFractionWords } from '../../fatigue-data'
import { figure } from '../../figure'
import type { CompressionModel } from '../model'
import { greatestForceN, leastForceN, statePitchMm, type CompressionState } from '../state'
import { shearStressMpa } from '../../stress'
import { stressCorrectionFactor } from '../../stress-factors'
import { fallsShort, finishCheck } from '../../checks/check'
import type { CompressionCheck } from './check'

/** Corrected stress at the greatest working load and at the least (zero where there is one point), MPa. */
export function greatestCorrectedStressMpa(model: CompressionModel, state: CompressionState): number {
  return stressCorrectionFactor(model.method, state.springIndex)
    * shearStressMpa(greatestForceN(state), state.meanDiameterMm, model.wireDiameterMm)
}

export function leastCorrectedStressMpa(model: CompressionModel, state: CompressionState): number {
  return stressCorrectionFactor(model.method, state.springIndex)
    * shearStressMpa(leastForceN(state), state.meanDiameterMm, model.wireDiameterMm)
}

/** Goodman safety factor on Zimmerli's data between the working loads. */
export function stateFatigueFactor(model: CompressionModel, state: CompressionState): number {
  const high = greatestCorrectedStressMpa(model, state)
  const low = leastCorrectedStressMpa(model, state)
  return goodmanZimmerliFactor((high - low) / 2, (high + low) / 2, model.tensileStrengthMpa, model.shotPeened)
}

/** Safety factor by published fractions of tensile strength; null for lives and wire they are not published for. */
export function stateLifeFractionFactor(model: CompressionModel, state: CompressionState): number | null {
  if (!hasLifeFractions(model)) return null
  const high = greatestCorrectedStressMpa(model, state)
  const low = leastCorrectedStressMpa(model, state)
  return lifeFractionFactor((high - low) / 2, (high + low) / 2, model.tensileStrengthMpa, model.cycles, model.shotPeened)
}

const FATIGUE_CAUTION = 1.2

export const fatigueCheck: CompressionCheck = {
  code: 'fatigue',
  applies: (model, state) =>
    model.cycles >= FATIGUE_CYCLES && !Number.isNaN(state.shortestLengthMm) && !Number.isNaN(model.tensileStrengthMpa),
  stops: (model, state) =>
    !hasFatigueData(model) || fallsShort(stateFatigueFactor(model, state), 1),
  describe: (model, state) => {
    const factor = stateFatigueFactor(model, state)
    const second = stateLifeFractionFactor(model, state)
    const differs = second !== null && (second >= 1) !== (factor >= 1)
    const says = `Fatigue safety factor ${figure(factor)} (Goodman through Zimmerli's data, ${model.shotPeened ? 'shot peened' : 'not peened'}, unlimited life)`
    const other = lifeFractionWords(second, model.cycles)
    return finishCheck(
      'fatigue',
      { stop: fatigueCheck.stops(model, state), caution: factor < FATIGUE_CAUTION || differs },
      factor,
      1,
      {
        stop: fatigueDataProblem(model) ?? `${says}: under 1, it may break within the life asked for.${other}`,
        caution: `${says}.${other}`,
        pass: `${says}.${other}`,
      },
    )
  },
}

/** Peening: wanted for dynamic duty, workable only where shot reaches between the coils (EN 13906-1, 10.3). */
export const peeningCheck: CompressionCheck = {
  code: 'peening',
  applies: model => model.shotPeened || model.dynamic,
  stops: () => false,
  describe: (model, state) => {
    const gap = statePitchMm(model, state) - model.wireDiameterMm
    const workable = model.wireDiameterMm > 1 && state.springIndex < 15 && gap > model.wireDiameterMm
    const rule = 'wire over 1 mm, index under 15, gap between coils over the wire diameter (EN 13906-1)'
    return finishCheck(
      'peening',
      { stop: false, caution: model.shotPeened ? !workable : workable },
      gap,
      model.wireDiameterMm,
      {
        stop: '',
        caution: model.shotPeened
          ? `Shot peening will not work well here: it needs ${rule}; the gap is ${figure(gap)} mm.`
          : 'Shot peening would lengthen its life: EN 13906-1 asks it for every dynamically loaded spring.',
        pass: model.shotPeened
          ? `Shot peening is workable: ${rule}.`
          : `Not shot peened; peening would not be workable here: it needs ${rule}.`,
      },
      // A life that counts on peening that shot cannot do is no life.
      model.shotPeened && !workable && model.cycles >= FATIGUE_CYCLES ? 'caution' : 'note',
    )
  },
}
