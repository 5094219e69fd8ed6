/** Days and times in the shop's zone, whoever reads them and wherever. */
export function useShopTime() {
  const timeZone = useRuntimeConfig().public.shopTimeZone
  return {
    timeZone,
    moment: (at: string) => formatMoment(at, timeZone),
    /** The day of an instant, without its time. */
    day: (at: string) => formatMoment(at, timeZone, { hasTime: false }),
    shortDay: (at: string) => formatMoment(at, timeZone, { hasTime: false, hasYear: false }),
    today: () => dayOf(new Date(), timeZone),
  }
}
