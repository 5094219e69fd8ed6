import type { OperationKind, PlannedMinutes, PricedDesign } from '../pricing'
import { isGround } from '../pricing'
import { PlanningError } from './errors'

/** One operation of a job, before it has a place in the plan. */
export interface RoutingOperation {
  /** 1, 2, 3 in the order of work. */
  position: number
  kind: OperationKind
  /** Kind of work centre that can do it; the same words as the kind so far. */
  centreKind: OperationKind
  setUpMinutes: number
  runMinutes: number
  quantity: number
}

/**
 * Operations of a spring in order: coiling with its hooks or legs formed by the coiler, stress relief where the design needs it,
 * end grinding where the ends are ground, inspection, packing. Minutes come from the price that was accepted. Throws PlanningError `minutes-missing`.
 */
export function buildRouting(
  design: Pick<PricedDesign, 'ends' | 'stressReliefMinutes'>,
  quantity: number,
  plannedMinutes: PlannedMinutes,
): RoutingOperation[] {
  const kinds: OperationKind[] = ['coiling']
  if (design.stressReliefMinutes > 0) kinds.push('stress-relief')
  if (isGround(design)) kinds.push('end-grinding')
  kinds.push('inspection', 'packing')

  return kinds.map((kind, index) => {
    const minutes = plannedMinutes[kind]
    if (!minutes) throw new PlanningError('minutes-missing', `The price has no planned time for ${kind}.`, kind)
    return { position: index + 1, kind, centreKind: kind, setUpMinutes: minutes.setUpMinutes, runMinutes: minutes.runMinutes, quantity }
  })
}
