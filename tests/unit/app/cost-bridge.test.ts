import { describe, expect, it } from 'vitest'
import { axisTicks, buildBridge } from '../../../app/utils/cost-bridge'

const row = (label: string, quotedMinor: number, actualMinor: number | null) => ({
  code: label, label, quotedBasis: '', actualBasis: '', quotedMinor, actualMinor, differenceMinor: actualMinor === null ? null : actualMinor - quotedMinor,
})

describe('the cost bridge', () => {
  const bridge = buildBridge({ comparedQuotedMinor: 30_000, actualCostMinor: 31_500, rows: [row('Wire', 10_000, 12_000), row('Coiling', 20_000, 19_500), row('Certificate', 1_800, null)] })

  it('steps from the quoted cost by each difference to the recorded one', () => {
    expect(bridge.bars.map(bar => [bar.label, bar.kind, bar.toMinor])).toEqual([['Quoted cost', 'whole', 30_000], ['Wire', 'up', 32_000], ['Coiling', 'down', 31_500], ['Recorded cost', 'whole', 31_500]])
  })
  it('leaves out a line that was never recorded', () => {
    expect(bridge.bars.some(bar => bar.label === 'Certificate')).toBe(false)
  })
  it('breaks the axis when the steps would be too small to see', () => {
    expect(bridge.isBroken).toBe(true)
    expect(bridge.axisFromMinor).toBeLessThan(30_000)
    expect(bridge.axisFromMinor).toBeGreaterThan(0)
  })
  it('starts at nought when nothing is recorded', () => {
    const empty = buildBridge({ comparedQuotedMinor: 0, actualCostMinor: 0, rows: [row('Wire', 10_000, null)] })
    expect(empty).toMatchObject({ axisFromMinor: 0, isBroken: false })
    expect(empty.axisToMinor).toBeGreaterThan(0)
  })
})

describe('the ticks of its axis', () => {
  it('are round amounts within it', () => {
    expect(axisTicks({ axisFromMinor: 63_000, axisToMinor: 76_000 }, 5)).toEqual([65_000, 70_000, 75_000])
    expect(axisTicks({ axisFromMinor: 0, axisToMinor: 10_100 }, 5)).toEqual([0, 5_000, 10_000])
  })
  it('are never finer than a whole unit and never more than asked for, but for one at the start', () => {
    expect(axisTicks({ axisFromMinor: 0, axisToMinor: 250 }, 5)).toEqual([0, 100, 200])
    expect(axisTicks({ axisFromMinor: 0, axisToMinor: 99_999 }, 3).length).toBeLessThanOrEqual(4)
  })
})
