import { describe, expect, it } from 'vitest'
import { dayOf, formatDay, formatMoment, formatWeekday, parseDay } from '~/utils/day-words'

const TODAY = '2026-12-01'
const read = (text: string) => parseDay(text, TODAY)

describe('days as a person types them', () => {
  it.each([
    ['14 Dec 2026', '2026-12-14'], ['14 december 2026', '2026-12-14'], ['Dec 14, 2026', '2026-12-14'], ['Mon 14 Dec 2026', '2026-12-14'], ['14th Dec 2026', '2026-12-14'],
    ['2026-12-14', '2026-12-14'], ['14.12.2026', '2026-12-14'], ['14.12.26', '2026-12-14'], ['25/12/2026', '2026-12-25'], ['12/25/2026', '2026-12-25'], ['5/5/2027', '2027-05-05'],
  ])('reads %s as %s', (text, day) => {
    expect(read(text)).toEqual({ ok: true, day })
  })

  it('takes a day without a year as the next one', () => {
    expect(read('14 Dec')).toEqual({ ok: true, day: '2026-12-14' })
    expect(read('4 Jan')).toEqual({ ok: true, day: '2027-01-04' })
  })

  it('asks where strokes leave two readings', () => {
    expect(read('01/02/2027')).toEqual({ ok: false, message: 'This can be read in two ways. Write 1 Feb 2027 or 2 Jan 2027.' })
  })

  it.each(['31 Feb 2027', '2026-13-01', '0 Dec 2026', 'soon', '', '14', '1.5.', 'Dec', '<script>'])('refuses %j', (text) => {
    expect(read(text).ok).toBe(false)
  })
})

describe('days as they are written', () => {
  it('writes a day, with its weekday, and without its year', () => {
    expect(formatDay('2026-12-15')).toBe('15 Dec 2026')
    expect(formatDay('2026-12-15', { hasYear: false })).toBe('15 Dec')
    expect(formatWeekday('2026-12-15')).toBe('Tuesday 15 Dec 2026')
  })

  it('writes an instant in the shop’s zone, whoever reads it', () => {
    expect(formatMoment('2026-07-01T23:30:00Z', 'Europe/Dublin')).toBe('2 Jul 2026, 00:30')
    expect(formatMoment('2026-12-09T08:05:00Z', 'Europe/Dublin', { hasTime: false, hasYear: false })).toBe('9 Dec')
    expect(dayOf(new Date('2026-07-01T23:30:00Z'), 'Europe/Dublin')).toBe('2026-07-02')
  })
})
