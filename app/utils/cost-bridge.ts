import type { JobCostView } from '#shared/schemas/ledger'

export type BridgeBar = { label: string, fromMinor: number, toMinor: number, kind: 'whole' | 'up' | 'down' }
export type Bridge = { bars: BridgeBar[], axisFromMinor: number, axisToMinor: number, isBroken: boolean }

/**
 * Steps from the quoted to the recorded cost of those lines that have a record: a whole bar, a bar for each difference,
 * a whole bar. The axis starts at nought unless the steps would be too small to see; then it is broken, and says so.
 */
export function buildBridge(job: Pick<JobCostView, 'comparedQuotedMinor' | 'actualCostMinor' | 'rows'>): Bridge {
  let level = job.comparedQuotedMinor
  const steps = job.rows.flatMap((row): BridgeBar[] => {
    if (!row.differenceMinor) return []
    const fromMinor = level
    level += row.differenceMinor
    return [{ label: row.label, fromMinor, toMinor: level, kind: row.differenceMinor > 0 ? 'up' : 'down' }]
  })
  const levels = [job.comparedQuotedMinor, job.actualCostMinor, ...steps.map(step => step.toMinor)]
  const lowest = Math.min(...levels)
  const highest = Math.max(...levels, 1)
  const isBroken = lowest > 0 && (highest - lowest) / highest < 0.5
  const axisFromMinor = isBroken ? Math.max(0, lowest - (highest - lowest || highest * 0.1) * 0.4) : 0
  return {
    bars: [{ label: 'Quoted cost', fromMinor: 0, toMinor: job.comparedQuotedMinor, kind: 'whole' }, ...steps, { label: 'Recorded cost', fromMinor: 0, toMinor: job.actualCostMinor, kind: 'whole' }],
    axisFromMinor, axisToMinor: highest + (highest - axisFromMinor) * 0.02, isBroken,
  }
}

/** Round amounts (1, 2 or 5 times a power of ten of the currency's unit) across the axis, at most `most` of them; minor units of a hundredth. */
export function axisTicks({ axisFromMinor, axisToMinor }: Pick<Bridge, 'axisFromMinor' | 'axisToMinor'>, most: number): number[] {
  const least = (axisToMinor - axisFromMinor) / most
  const power = 10 ** Math.floor(Math.log10(least))
  const step = Math.max(100, power * ([1, 2, 5, 10].find(times => times * power >= least) ?? 10))
  const ticks: number[] = []
  for (let minor = Math.ceil(axisFromMinor / step) * step; minor <= axisToMinor; minor += step) ticks.push(Math.round(minor))
  return ticks
}
