import type { SizeOptions } from './types'

/** Steps of what can be made; NaN where continuous. */
export interface Steps {
  readonly coilStep: number
  readonly diameterStepMm: number
}

/** Index range of the quality table: the bounds every search starts from. */
export const LEAST_INDEX = 4
export const MOST_INDEX = 20

/** Greatest relative error of an asked load (or rate, where no load is asked) that steps of coil and diameter may cause. */
export const STEP_TOLERANCE = 0.01

// A guard against absurd steps; a real wire has some hundred steps of diameter and coils.
const MOST_STEPS = 20_000

export const stepsOf = (request: SizeOptions): Steps => ({ coilStep: request.coilStep ?? Number.NaN, diameterStepMm: request.diameterStepMm ?? Number.NaN })

export const isContinuous = ({ coilStep, diameterStepMm }: Steps): boolean => Number.isNaN(coilStep) && Number.isNaN(diameterStepMm)

/** A multiple of a step without the dust of binary fractions. */
export function stepped(index: number, step: number): number {
  return Math.round(index * step * 1e6) / 1e6
}

/** Calls with every multiple of the step from `low` to `high`, ends included, in rising order. */
export function forEachStep(low: number, high: number, step: number, visit: (value: number) => void): void {
  const from = Math.ceil(low / step - 1e-9)
  const to = Math.min(Math.floor(high / step + 1e-9), from + MOST_STEPS)
  for (let i = from; i <= to; i++) visit(stepped(i, step))
}

/** What steps did to the request, in a sentence; null where nothing can be off. */
export function stepsNote(request: SizeOptions, what: string): string | null {
  if (request.coilStep === undefined || request.diameterStepMm === undefined) return null
  return `Coils go in steps of ${request.coilStep} and the mean diameter in steps of ${request.diameterStepMm} mm. ${what} may differ from those asked by up to ${STEP_TOLERANCE * 100} %.`
}
