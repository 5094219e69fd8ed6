/** The smallest of 1, 2, 5 times a power of ten that is not under `least`. */
export function niceStep(least: number): number {
  if (!(least > 0) || !Number.isFinite(least)) return 1
  const power = 10 ** Math.floor(Math.log10(least))
  const ratio = least / power
  return power * (ratio <= 1 + 1e-9 ? 1 : ratio <= 2 + 1e-9 ? 2 : ratio <= 5 + 1e-9 ? 5 : 10)
}

/** Places needed to write multiples of a step without loss: 0.05 needs two. */
export const stepDecimals = (step: number): number => Math.max(0, -Math.floor(Math.log10(step) + 1e-9))

/** Multiples of `step` from 0 up to `last`, without the drift of repeated adding. */
export function ticksTo(last: number, step: number): number[] {
  const count = Math.floor(last / step + 1e-6)
  return Array.from({ length: count + 1 }, (_, i) => i * step)
}
