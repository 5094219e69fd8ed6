import { describe, expect, it } from 'vitest'
import { getMaterial, isMaterialCode, minimumTensileStrengthMpa } from '#shared/spring'
import data from './data/wire-strengths.json'

describe.each(data.tables.map(t => [t.material, t] as const))('strength of %s against its published table', (code, table) => {
  const printed: Readonly<Record<string, number[] | undefined>> = table.rows
  const rows = Object.entries(printed).flatMap(([d, limits = []]) => {
    const [least, most] = limits
    return least === undefined || most === undefined ? [] : [{ d, least, most }]
  })
  const slips: Readonly<Record<string, string | undefined>> = table.slips
  if (!isMaterialCode(code)) throw new Error(`Unknown material ${code}`)
  const material = getMaterial(code)

  it('has rows enough to mean something', () => {
    expect(rows.length).toBeGreaterThanOrEqual(11)
  })

  it('gives the printed least value at every diameter of the table but for the slip named', () => {
    const off = rows.filter(({ d, least }) => {
      const ours = minimumTensileStrengthMpa(material, Number(d))
      return !ours.known || ours.minimumMpa !== least
    }).map(({ d }) => d)
    expect(off.every(d => slips[d] !== undefined)).toBe(true)
    expect(off).toEqual(code === 'EN10270-1-SM' ? ['15.0'] : [])
  })

  it('joins the rows by its formula within 10 MPa', () => {
    for (const { d, least } of rows) {
      if (slips[d]?.includes('formula')) continue
      // Just beside the row the formula speaks; strength is rounded to 10 MPa.
      const beside = minimumTensileStrengthMpa(material, Number(d) * 1.0001)
      if (!beside.known) continue
      expect(Math.abs(beside.minimumMpa - least), `${code} ${d} mm`).toBeLessThanOrEqual(10)
    }
  })

  it('lies under the greatest printed strength', () => {
    for (const { d, most } of rows) {
      const ours = minimumTensileStrengthMpa(material, Number(d))
      expect(ours.known && ours.minimumMpa < most, `${code} ${d} mm`).toBe(true)
    }
  })
})
