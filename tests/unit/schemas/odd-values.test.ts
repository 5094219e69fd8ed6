import { describe, expect, it } from 'vitest'
import { requirementSchema } from '#shared/schemas/enquiry'
import { daySchema } from '#shared/schemas/shared-fields'
import { benchRecordBodySchema, loadingQuerySchema } from '#shared/schemas/shop'
import { SizeRequestSchema } from '#shared/schemas/spring'
import { receiveWireBodySchema } from '#shared/schemas/works'
import { decodeMomentCursor, encodeCursor } from '#server/services/cursor'

const ID = '6f1f8a52-7d0e-4c39-9a43-4c3a0d6d6a11'

describe('values that a schema would take and the database would not (S-9, S-11)', () => {
  it.each(['0000-01-01', '1999-12-31', '2200-01-01', '9999-12-31', '2027-02-29', '2026-13-01', ''])('refuses the day "%s"', (day) => {
    expect(daySchema.safeParse(day).success).toBe(false)
    expect(loadingQuerySchema.safeParse({ from: day }).success).toBe(false)
  })

  it('takes days that a plan can hold', () => {
    expect(['2000-01-01', '2028-02-29', '2199-12-31'].every(day => daySchema.safeParse(day).success)).toBe(true)
  })

  it('says at the field that a wanted day is out of range', () => {
    const parsed = requirementSchema.safeParse({
      kind: 'compression', couldHurt: 'no', quantities: [100], neededOn: '0000-01-01', need: { knows: 'rate-and-length', rateNPerMm: 2, freeLengthMm: 50, shortestLengthMm: 30 },
    })
    expect(parsed.error?.issues.map(issue => issue.path.join('.'))).toEqual(['neededOn'])
  })

  it('refuses control characters in notes, and takes lines and tabs', () => {
    const notes = (note: string) => [benchRecordBodySchema.safeParse({ id: ID, act: 'count', note }).success, receiveWireBodySchema.safeParse({ id: ID, massKg: 1, note }).success]
    expect(notes('coil 4\u0000')).toEqual([false, false])
    expect(notes('coil 4\u001b[2J')).toEqual([false, false])
    expect(notes('coil 4,\n\tgood')).toEqual([true, true])
  })

  it('refuses a cursor beyond what the database counts in, or with an id that is none', () => {
    expect(decodeMomentCursor(encodeCursor('1796108400000000', ID))).toEqual({ at: '1796108400000000', id: ID })
    for (const cursor of [encodeCursor('9'.repeat(17), ID), encodeCursor('99999999999999999999', ID), encodeCursor('1', '-'.repeat(36)), encodeCursor('1', `${ID}\u0000`), encodeCursor('-1', ID), 'no cursor'])
      expect(() => decodeMomentCursor(cursor), cursor).toThrow('This page of the list does not exist')
  })
})

describe('work that one request may ask for (S-63)', () => {
  const request = (materials: readonly string[], wireDiametersMm: readonly number[]) => SizeRequestSchema.safeParse({
    kind: 'compression', points: [{ lengthMm: 50, forceN: 60 }], materials, wireDiametersMm, objective: 'mass',
  })
  const diameters = (count: number) => Array.from({ length: count }, (_, index) => 1 + index / 100)

  it('is at most two hundred named wires, doubles counted once', () => {
    expect(request(['EN10270-1-SH'], diameters(200)).success).toBe(true)
    expect(request(['EN10270-1-SH', 'EN10270-1-SH'], [...diameters(199), 1]).success).toBe(true)
    expect(request(['EN10270-1-SH', 'EN10270-1-SM'], diameters(101)).error?.issues.map(issue => [issue.path.join('.'), issue.message]))
      .toEqual([['wireDiametersMm', 'These are 202 wires, each material in each diameter. Name at most 200 at once.']])
  })
})
