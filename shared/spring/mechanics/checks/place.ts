import { figure } from '../figure'
import type { WireModel } from '../wire-model'
import { exceeds, finishCheck, type SpringCheck } from './check'

const TEMPERATURE_CAUTION = 0.8

export const temperatureCheck: SpringCheck<WireModel, unknown> = {
  code: 'temperature',
  applies: model => !Number.isNaN(model.temperatureC),
  stops: model => exceeds(model.temperatureC, model.material.temperatureLimitC.value),
  describe: (model, state) => {
    const t = model.temperatureC
    const limit = model.material.temperatureLimitC.value
    // Music and hard-drawn wire are not for service below freezing (Shigley, Table 10-3).
    const cold = t < 0 && model.material.family === 'cold-drawn-carbon'
    return finishCheck(
      'temperature',
      { stop: temperatureCheck.stops(model, state), caution: cold || t > TEMPERATURE_CAUTION * limit },
      t,
      limit,
      {
        stop: `${figure(t)} °C is above the limit of ${model.material.name}, ${limit} °C (${model.material.temperatureLimitC.source}).`,
        caution: cold
          ? `Cold-drawn carbon wire is not for service below freezing (Shigley, Table 10-3); ${figure(t)} °C is asked for.`
          : `${figure(t)} °C is over 80 % of the limit of ${model.material.name}, ${limit} °C (${model.material.temperatureLimitC.source}): some force will be lost by relaxation.`,
        pass: `${figure(t)} °C is within the limit of ${model.material.name}, ${limit} °C (${model.material.temperatureLimitC.source}).`,
      },
    )
  },
}

// EN 13906-1 states relaxation as curves of force lost in 48 hours by wire, heat and stress, which are not held here. Common practice, no source.
const RELAXATION_HEAT = 0.6
const RELAXATION_STRESS = 0.8

/**
 * The check of temperature for a kind of spring, which also cautions where force will be lost by relaxation: warm, and held under much
 * stress. `stressShare` is the greatest working stress over the static limit; NaN where none is known.
 */
export function withRelaxation<Model extends WireModel, State>(stressShare: (model: Model, state: State) => number): SpringCheck<Model, State> {
  return {
    ...temperatureCheck,
    describe: (model, state) => {
      const found = temperatureCheck.describe(model, state)
      const share = stressShare(model, state)
      const t = model.temperatureC
      if (!found.ok || !(t > RELAXATION_HEAT * model.material.temperatureLimitC.value && share > RELAXATION_STRESS)) return found
      return {
        ...found, ok: false, severity: 'caution',
        message: `${figure(t)} °C is over 60 % of the limit of ${model.material.name}, ${model.material.temperatureLimitC.value} °C (${model.material.temperatureLimitC.source}), at ${figure(100 * share)} % of the stress allowed: some force will be lost by relaxation (common practice; EN 13906-1 has curves for it, which are not held here).`,
      }
    },
  }
}

/** Corrosion where the spring lives. */
export const surroundingsCheck: SpringCheck<WireModel, unknown> = {
  code: 'surroundings',
  applies: model => model.context.surroundings !== undefined && model.context.surroundings !== 'dry',
  stops: () => false,
  describe: (model) => {
    const place = model.context.surroundings ?? 'dry'
    const harsh = place === 'salt' || place === 'chemical'
    return finishCheck(
      'surroundings',
      { stop: false, caution: !model.material.resistsCorrosion || harsh },
      Number.NaN,
      Number.NaN,
      {
        stop: '',
        caution: `Surroundings: ${place}. ${model.material.corrosionNote}`,
        pass: `Surroundings: ${place}. ${model.material.corrosionNote}`,
      },
      'caution',
    )
  },
}
