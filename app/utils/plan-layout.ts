import { toLocalTime } from '#shared/time/zone'

/** The window of the plan: working days side by side, each showing the same hours. Minutes of the day in the shop's zone. */
export type PlanWindow = { days: readonly string[], startMinute: number, endMinute: number, timeZone: string }
/** A piece of a bar on one day, in per cent of the whole width. */
export type BarPiece = { leftPercent: number, widthPercent: number, continuesBefore: boolean, continuesAfter: boolean }

const DAY_MS = 86_400_000

/** The next `count` days from Monday to Friday, from `from` on (YYYY-MM-DD). */
export function workingDays(from: string, count: number): string[] {
  const days: string[] = []
  for (let time = Date.parse(`${from}T00:00:00Z`); days.length < count; time += DAY_MS) {
    const weekday = new Date(time).getUTCDay()
    if (weekday !== 0 && weekday !== 6) days.push(new Date(time).toISOString().slice(0, 10))
  }
  return days
}

/** Words beneath a lane, for bars too narrow to hold their own. */
export type LaneLabel = { leftPercent: number, text: string }

/** Labels for narrow bars (their first pieces, from left to right); those that would overlap are joined: `1207, 1208`, `1207 to 1212`. */
export function laneLabels(bars: readonly { leftPercent: number, text: string }[], labelWidthPercent: number): LaneLabel[] {
  const labels: { leftPercent: number, texts: string[] }[] = []
  for (const { leftPercent, text } of [...bars].sort((a, b) => a.leftPercent - b.leftPercent)) {
    const last = labels.at(-1)
    const lastWidth = last ? Math.min(2, last.texts.length) * labelWidthPercent : 0
    if (last && leftPercent < last.leftPercent + lastWidth) last.texts.push(text)
    else labels.push({ leftPercent, texts: [text] })
  }
  return labels.map(({ leftPercent, texts }) => ({ leftPercent, text: texts.length > 2 ? `${texts[0]} to ${texts.at(-1)}` : texts.join(', ') }))
}

/** Where a moment stands, in per cent of the width; null outside the window's days. Hours that are not shown are drawn at the edge. */
export function positionOf(moment: Date, window: PlanWindow): number | null {
  const { day, minute } = toLocalTime(moment.getTime(), window.timeZone)
  const index = window.days.indexOf(day)
  if (index < 0) return null
  const shown = window.endMinute - window.startMinute
  const inDay = Math.min(shown, Math.max(0, minute - window.startMinute)) / shown
  return (index + inDay) / window.days.length * 100
}

/** The bar of an operation: one piece per day that it touches. Only hours in which its work centre is open are drawn. */
export function barPieces(startsAt: Date, endsAt: Date, window: PlanWindow, shift: { startMinute: number, endMinute: number }): BarPiece[] {
  const from = toLocalTime(startsAt.getTime(), window.timeZone)
  const to = toLocalTime(endsAt.getTime(), window.timeZone)
  const shown = window.endMinute - window.startMinute
  const pieces: BarPiece[] = []
  window.days.forEach((day, index) => {
    if (day < from.day || day > to.day) return
    const first = day === from.day ? Math.max(from.minute, shift.startMinute) : shift.startMinute
    const last = day === to.day ? Math.min(to.minute, shift.endMinute) : shift.endMinute
    if (last <= first) return
    const left = Math.max(0, first - window.startMinute)
    const right = Math.min(shown, last - window.startMinute)
    pieces.push({
      leftPercent: (index + left / shown) / window.days.length * 100, widthPercent: (right - left) / shown / window.days.length * 100,
      continuesBefore: day !== from.day, continuesAfter: day !== to.day,
    })
  })
  return pieces
}
