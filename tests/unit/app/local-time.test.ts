import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { instantOfLocal, localOfInstant } from '../../../app/utils/local-time'

const ZONES = ['Europe/Dublin', 'America/New_York', 'Asia/Kolkata', 'UTC']

describe('a time that the supervisor types', () => {
  it('is the shop’s time, whatever zone the browser is in', () => {
    expect(instantOfLocal('2026-12-09T10:30', 'Europe/Dublin')?.toISOString()).toBe('2026-12-09T10:30:00.000Z')
    expect(instantOfLocal('2026-07-09T10:30', 'Europe/Dublin')?.toISOString()).toBe('2026-07-09T09:30:00.000Z')
    expect(instantOfLocal('2026-07-09T10:30', 'America/New_York')?.toISOString()).toBe('2026-07-09T14:30:00.000Z')
  })
  it('comes back as it was typed', () => {
    fc.assert(fc.property(fc.integer({ min: 0, max: 525_600 }), fc.constantFrom(...ZONES), (minute, zone) => {
      const instant = new Date(Date.parse('2026-01-01T00:00:00Z') + minute * 60_000)
      const local = localOfInstant(instant, zone)
      expect(localOfInstant(instantOfLocal(local, zone)!, zone)).toBe(local)
    }))
  })
  it('that the clocks skip in spring becomes one that exists', () => {
    // 29 March 2026, 01:30 does not exist in Dublin.
    const instant = instantOfLocal('2026-03-29T01:30', 'Europe/Dublin')!
    expect(Math.abs(instant.getTime() - Date.parse('2026-03-29T01:00:00Z'))).toBeLessThanOrEqual(3_600_000)
  })
  it('that is no time is refused', () => {
    for (const text of ['', '2026-12-09', 'tomorrow', '2026-13-09T10:30', '2026-12-09T25:00']) expect(instantOfLocal(text, 'Europe/Dublin')).toBeNull()
  })
})
