import { fallsShort, finishCheck } from '../../checks/check'
import { FATIGUE_CYCLES } from '../../fatigue'
import { fatigueDataProblem, hasFatigueData, lifeFractionWords } from '../../fatigue-data'
import { figure } from '../../figure'
import { extensionFatigueFactor, extensionLifeFractionFactor, PLACE_WORDS, weakestPlace } from '../fatigue'
import { hasPoint, hasStrength, type ExtensionCheck } from './check'

const CAUTION = 1.2

export const fatigueCheck: ExtensionCheck = {
  code: 'fatigue',
  applies: (model, state) => model.cycles >= FATIGUE_CYCLES && hasPoint(state) && hasStrength(model),
  stops: (model, state) => !hasFatigueData(model) || fallsShort(extensionFatigueFactor(model, state), 1),
  describe: (model, state) => {
    const factor = extensionFatigueFactor(model, state)
    const second = extensionLifeFractionFactor(model, state)
    const differs = second !== null && (second >= 1) !== (factor >= 1)
    const says = `Fatigue safety factor ${figure(factor)}, least in ${PLACE_WORDS[weakestPlace(model, state)]} (Goodman through Zimmerli's data, not peened, unlimited life)`
    const other = lifeFractionWords(second, model.cycles)
    return finishCheck(
      'fatigue', { stop: fatigueCheck.stops(model, state), caution: factor < CAUTION || differs }, factor, 1,
      { stop: fatigueDataProblem(model) ?? `${says}: under 1, it may break within the life asked for.${other}`, caution: `${says}.${other}`, pass: `${says}.${other}` },
    )
  },
}
