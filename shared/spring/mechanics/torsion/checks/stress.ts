import { exceeds, fallsShort, finishCheck } from '../../checks/check'
import { FATIGUE_CYCLES } from '../../fatigue'
import { fatigueDataProblem, hasFatigueData } from '../../fatigue-data'
import { figure } from '../../figure'
import { torsionFatigueFactor, torsionLifeFractionFactor } from '../fatigue'
import { comparedBendingMpa, greatestMomentNmm } from '../state'
import { hasPoint, hasStrength, type TorsionCheck } from './check'

const WORKING_CAUTION = 0.9
const FATIGUE_CAUTION = 1.2

/** Bending stress at the greatest working moment against the static limit. */
export const stressWorkingCheck: TorsionCheck = {
  code: 'stress-working',
  applies: (model, state) => hasStrength(model) && hasPoint(state),
  stops: (model, state) => exceeds(comparedBendingMpa(model, state, greatestMomentNmm(state)), model.allowableStressMpa),
  describe: (model, state) => {
    const stress = comparedBendingMpa(model, state, greatestMomentNmm(state))
    const limit = model.allowableStressMpa
    const says = `Bending stress at the greatest working moment is ${figure(stress)} MPa, limit ${figure(limit)} MPa: ${model.staticLimit.basis}${model.loadOpens ? ', a fifth less since the load opens the coil' : ''}`
    return finishCheck('stress-working', { stop: stressWorkingCheck.stops(model, state), caution: stress > WORKING_CAUTION * limit }, stress, limit, {
      stop: `${says}.`, caution: `${says}. Over 90 % of it.`, pass: `${says}.`,
    })
  },
}

export const fatigueCheck: TorsionCheck = {
  code: 'fatigue',
  applies: (model, state) => model.cycles >= FATIGUE_CYCLES && hasPoint(state) && hasStrength(model),
  stops: (model, state) => !hasFatigueData(model) || fallsShort(torsionFatigueFactor(model, state), 1),
  describe: (model, state) => {
    const factor = torsionFatigueFactor(model, state)
    const second = torsionLifeFractionFactor(model, state)
    const differs = second !== null && (second >= 1) !== (factor >= 1)
    const says = `Fatigue safety factor ${figure(factor)} in bending (Goodman through Zimmerli's data over 0.577, not peened, unlimited life)`
    const other = second === null ? '' : ` By the fractions of tensile strength published for music wire at ${figure(model.cycles)} strokes it is ${figure(second)}.`
    return finishCheck('fatigue', { stop: fatigueCheck.stops(model, state), caution: factor < FATIGUE_CAUTION || differs }, factor, 1, {
      stop: fatigueDataProblem(model) ?? `${says}: under 1, it may break within the life asked for.${other}`, caution: `${says}.${other}`, pass: `${says}.${other}`,
    })
  },
}
