/** Minutes as a person plans them: `45 min`, `2.5 h`. */
export function minutesText(minutes: number): string {
  return minutes < 90 ? `${Math.round(minutes)}\u202fmin` : `${(minutes / 60).toFixed(1)}\u202fh`
}
