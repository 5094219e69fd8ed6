/** The calendar day, YYYY-MM-DD, of a moment in a zone. */
export function dayIn(moment: Date, timeZone: string): string {
  return new Intl.DateTimeFormat('en-CA', { timeZone, year: 'numeric', month: '2-digit', day: '2-digit' }).format(moment)
}
