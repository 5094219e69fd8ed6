import type { LadderRung } from '#shared/schemas/quote'

/** One rung as it is priced or stored. Amounts in minor units. */
export type RungAmounts = { quantity: number, unitPrice: string, netMinor: number, taxMinor: number, grossMinor: number, depositMinor: number, dispatchOn: string | null }

/** The ladder as a customer sees it, smallest quantity first: no cost, no margin. The balance is what the deposit leaves. */
export function toLadder(rungs: readonly RungAmounts[]): LadderRung[] {
  const steps = [...rungs].sort((a, b) => a.quantity - b.quantity)
  return steps.map((rung, index) => {
    const next = steps[index + 1]
    return {
      quantity: rung.quantity, unitPrice: rung.unitPrice, netMinor: rung.netMinor, taxMinor: rung.taxMinor, grossMinor: rung.grossMinor,
      depositMinor: rung.depositMinor, balanceMinor: rung.grossMinor - rung.depositMinor, dispatchOn: rung.dispatchOn,
      nextStep: next ? { moreSprings: next.quantity - rung.quantity, moreMinor: next.netMinor - rung.netMinor } : null,
    }
  })
}
