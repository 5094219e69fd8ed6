import type { StressMethod } from '../codes'

/** EN 13906-1 factor k = (w + 0.5)/(w - 0.75), from memory; the same as Bergstraesser's (4C + 2)/(4C - 3). */
export function bergstraesserFactor(springIndex: number): number {
  return (springIndex + 0.5) / (springIndex - 0.75)
}

/** Wahl factor (4C - 1)/(4C - 4) + 0.615/C (Shigley ch. 10; Jindal ch. 8). */
export function wahlFactor(springIndex: number): number {
  return (4 * springIndex - 1) / (4 * springIndex - 4) + 0.615 / springIndex
}

/** Direct shear alone, without curvature: 1 + 0.5/C (Bhandari ch. 10; Jindal ch. 8). */
export function directShearFactor(springIndex: number): number {
  return 1 + 0.5 / springIndex
}

/** The factor a method corrects stress with. */
export function stressCorrectionFactor(method: StressMethod, springIndex: number): number {
  return method === 'wahl' ? wahlFactor(springIndex) : bergstraesserFactor(springIndex)
}
