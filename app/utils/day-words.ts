const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'] as const
const WEEKDAYS = ['Sunday', 'Monday', 'Tuesday', 'Wednesday', 'Thursday', 'Friday', 'Saturday'] as const

/** A calendar day YYYY-MM-DD as `15 Dec 2026`, without the year as `15 Dec`. Other text comes back as it is. */
export function formatDay(day: string, { hasYear = true }: { hasYear?: boolean } = {}): string {
  const [year, month, date] = day.slice(0, 10).split('-').map(Number)
  const name = MONTHS[(month ?? 0) - 1]
  return name && date ? `${date} ${name}${hasYear ? ` ${year}` : ''}` : day
}

/** The same with the name of the weekday before it: `Tuesday 15 Dec 2026`. */
export function formatWeekday(day: string): string {
  const at = new Date(`${day}T00:00:00Z`)
  return Number.isNaN(at.getTime()) ? day : `${WEEKDAYS[at.getUTCDay()]} ${formatDay(day)}`
}

/** The day and the time of an instant (ISO 8601) in a time zone: `9 Dec 2026, 08:05`; without the time the day alone. */
export function formatMoment(at: string, timeZone: string, { hasTime = true, hasYear = true }: { hasTime?: boolean, hasYear?: boolean } = {}): string {
  const instant = new Date(at)
  if (Number.isNaN(instant.getTime())) return at
  const parts = new Intl.DateTimeFormat('en-GB', { timeZone, year: 'numeric', month: '2-digit', day: '2-digit', hour: '2-digit', minute: '2-digit', hourCycle: 'h23' }).formatToParts(instant)
  const part = (type: string) => parts.find(one => one.type === type)?.value ?? ''
  const day = formatDay(`${part('year')}-${part('month')}-${part('day')}`, { hasYear })
  return hasTime ? `${day}, ${part('hour')}:${part('minute')}` : day
}

/** The calendar day of an instant in a time zone, as YYYY-MM-DD. */
export function dayOf(instant: Date, timeZone: string): string {
  return new Intl.DateTimeFormat('sv-SE', { timeZone }).format(instant)
}

export type ParsedDay = { ok: true, day: string } | { ok: false, message: string }
const NOT_A_DAY = 'Write a date such as 14 Dec 2026.'

/**
 * A typed day: `14 Dec 2026`, `Dec 14, 2026`, `14.12.2026`, `2026-12-14`, `14 Dec` (the next one after `today`).
 * With strokes only where there is one reading: `25/12/2026`, but not `01/02/2026`.
 */
export function parseDay(text: string, today: string): ParsedDay {
  const words = text.trim().toLowerCase().replace(/(\d)(st|nd|rd|th)\b/, '$1').split(/[\s,./-]+/).filter(word => word && !WEEKDAYS.some(name => name.toLowerCase().startsWith(word) && word.length > 2))
  const months = words.map(word => word.length > 2 ? MONTHS.findIndex(month => word.startsWith(month.toLowerCase())) + 1 : 0)
  const named = months.find(month => month > 0)
  const numbers = words.filter((_, at) => !months[at]).map(Number)
  if (numbers.some(value => !Number.isInteger(value) || value < 1)) return { ok: false, message: NOT_A_DAY }
  const [a = 0, b = 0, c = 0] = numbers
  if (named) {
    if (numbers.length === 1) return nextDay(named, a, today)
    return numbers.length === 2 ? (a > 31 ? makeDay(a, named, b) : makeDay(b, named, a)) : { ok: false, message: NOT_A_DAY }
  }
  if (numbers.length !== 3) return { ok: false, message: NOT_A_DAY }
  if (a > 31) return makeDay(a, b, c)
  if (!text.includes('/') || a > 12 || a === b) return makeDay(c, b, a)
  if (b > 12) return makeDay(c, a, b)
  return { ok: false, message: `This can be read in two ways. Write ${a} ${MONTHS[b - 1]} ${c} or ${b} ${MONTHS[a - 1]} ${c}.` }
}

function makeDay(year: number, month: number, date: number): ParsedDay {
  const full = year < 100 ? 2000 + year : year
  const at = new Date(Date.UTC(full, month - 1, date))
  if (full > 9999 || at.getUTCMonth() !== month - 1 || at.getUTCDate() !== date) return { ok: false, message: 'There is no such day. Look at the date again.' }
  return { ok: true, day: at.toISOString().slice(0, 10) }
}

function nextDay(month: number, date: number, today: string): ParsedDay {
  const year = Number(today.slice(0, 4))
  const made = makeDay(year, month, date)
  return made.ok && made.day < today ? makeDay(year + 1, month, date) : made
}
