/** A number as a sentence shows it: four figures or so, no trailing zeros, no locale. */
export function figure(value: number): string {
  const size = Math.abs(value)
  if (size === 0) return '0'
  if (size >= 1e7 || size < 1e-3) return value.toExponential(2)
  const decimals = size >= 1000 ? 0 : size >= 100 ? 1 : size >= 10 ? 2 : 3
  const text = value.toFixed(decimals)
  return decimals > 0 ? text.replace(/\.?0+$/, '') : text
}
