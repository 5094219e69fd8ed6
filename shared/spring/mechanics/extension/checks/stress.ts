import { exceeds, finishCheck } from '../../checks/check'
import { figure } from '../../figure'
import type { ExtensionModel } from '../model'
import { bodyStressMpa, greatestExtensionForceN, hookBendingMpa, hookTorsionMpa, type ExtensionState } from '../state'
import { hasPoint, hasStrength, type ExtensionCheck } from './check'

const CAUTION = 0.9

interface Measured {
  readonly code: string
  readonly stressMpa: (model: ExtensionModel, state: ExtensionState, forceN: number) => number
  readonly limitMpa: (model: ExtensionModel) => number
  readonly words: (model: ExtensionModel, state: ExtensionState) => { readonly what: string, readonly basis: string }
}

function stressCheck({ code, stressMpa, limitMpa, words }: Measured): ExtensionCheck {
  const stops = (model: ExtensionModel, state: ExtensionState) => exceeds(stressMpa(model, state, greatestExtensionForceN(state)), limitMpa(model))
  return {
    code,
    applies: (model, state) => hasStrength(model) && hasPoint(state),
    stops,
    describe: (model, state) => {
      const stress = stressMpa(model, state, greatestExtensionForceN(state))
      const limit = limitMpa(model)
      const { what, basis } = words(model, state)
      const says = `${what} at the greatest working load is ${figure(stress)} MPa, limit ${figure(limit)} MPa: ${basis}`
      return finishCheck(code, { stop: stops(model, state), caution: stress > CAUTION * limit }, stress, limit, {
        stop: `${says}.`, caution: `${says}. Over 90 % of it.`, pass: `${says}.`,
      })
    },
  }
}

const share = (limit: number, strength: number) => Math.round((limit / strength) * 100) / 100

/** Shear in the body. */
export const stressWorkingCheck = stressCheck({
  code: 'stress-working',
  stressMpa: bodyStressMpa,
  limitMpa: model => model.allowableStressMpa,
  words: model => ({ what: 'Stress in the body', basis: model.staticLimit.basis }),
})

/** Bending at the top of the hook. */
export const hookBendingCheck = stressCheck({
  code: 'stress-hook-bending',
  stressMpa: hookBendingMpa,
  limitMpa: model => model.hookBendingLimitMpa,
  words: (model, state) => ({
    what: `Bending in the hooks (mean radius ${figure(state.bendRadiusMm)} mm)`,
    basis: `${share(model.hookBendingLimitMpa, model.tensileStrengthMpa)} of the tensile strength (${model.hookBasis})`,
  }),
})

/** Torsion where the hook leaves the body. */
export const hookTorsionCheck = stressCheck({
  code: 'stress-hook-torsion',
  stressMpa: hookTorsionMpa,
  limitMpa: model => model.hookTorsionLimitMpa,
  words: (model, state) => ({
    what: `Torsion where the hooks leave the body (mean radius ${figure(state.sideBendRadiusMm)} mm)`,
    basis: `${share(model.hookTorsionLimitMpa, model.tensileStrengthMpa)} of the tensile strength (${model.hookBasis})`,
  }),
})

// At least 1.5 d is recommended (public guideline on extension loops); a German practice note asks at least d.
const EASY_RADIUS = 1.5

/** Bend radii of the hooks. A radius of half the wire or less cannot be bent at all; the stress checks cannot judge it. */
export const hookBendCheck: ExtensionCheck = {
  code: 'hook-bend',
  applies: () => true,
  stops: (model, state) => !(Math.min(state.bendRadiusMm, state.sideBendRadiusMm) > model.wireDiameterMm / 2),
  describe: (model, state) => {
    const least = Math.min(state.bendRadiusMm, state.sideBendRadiusMm)
    const easy = EASY_RADIUS * model.wireDiameterMm
    const says = `The tightest bend of the hooks has a mean radius of ${figure(least)} mm`
    return finishCheck('hook-bend', { stop: hookBendCheck.stops(model, state), caution: least < easy }, least, easy, {
      stop: `${says}, no more than half the wire: it cannot be bent.`,
      caution: `${says}; at least 1.5 times the wire, ${figure(easy)} mm, is recommended.`,
      pass: `${says}, at least 1.5 times the wire.`,
    })
  },
}
