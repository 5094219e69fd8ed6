import type { CatalogueWire } from '../catalogue/list-wires'
import { buildRouting, PlanningError, promiseDate, wireWaitDays } from '../../engine/planning'
import { readNumberRates, type PriceBook, type PricedDesign, type PricedQuantity } from '../../engine/pricing'
import { officeCalendarOf, planCentresOf, type ShopPlan } from './shop-plan'

/** Work of more than about a year of one shift is not placed by a machine. */
const MOST_MINUTES = 120_000

/**
 * The day a priced quantity could be dispatched, found by placing its job in the plan as it stands; null where no work centre
 * takes its wire or the work is beyond a year, which a person then looks at.
 */
export function promiseDispatch(
  { design, wire, priced, book, plan, clock }:
  { design: PricedDesign, wire: CatalogueWire, priced: Pick<PricedQuantity, 'quantity' | 'plannedMinutes' | 'wirePlannedKg'>, book: PriceBook, plan: ShopPlan, clock: { now: Date, timeZone: string } },
): string | null {
  const rates = readNumberRates(book)
  const minutes = Object.values(priced.plannedMinutes).reduce((sum, { setUpMinutes, runMinutes }) => sum + setUpMinutes + runMinutes, 0)
  if (minutes > MOST_MINUTES) return null
  try {
    return promiseDate({
      nowMs: clock.now.getTime(),
      wireLeadDays: wireWaitDays({ neededKg: Number(priced.wirePlannedKg), freeStockKg: Number(wire.stockKg), leadDays: wire.leadDays }),
      depositHoldDays: rates['policy.deposit-hold-days'],
      bufferDays: rates['promise.buffer-days'],
      shopCalendar: officeCalendarOf(plan, clock.timeZone),
      operations: buildRouting(design, priced.quantity, priced.plannedMinutes),
      centres: planCentresOf(plan, clock.timeZone),
      busyByCentre: plan.busyByCentre,
      wireDiameterMm: design.wireDiameterMm,
    }).dispatchOn
  }
  catch (error) {
    if (error instanceof PlanningError && (error.code === 'no-centre' || error.code === 'never-open')) return null
    throw error
  }
}
