import type { RungAmounts } from '../quotes/ladder'
import type { WorkedRung } from './price-design'

/** What a customer may see of a priced quantity. */
export const rungAmountsOf = (rung: WorkedRung): RungAmounts => ({
  quantity: rung.quantity, unitPrice: rung.unitPrice, netMinor: rung.netMinor, taxMinor: rung.taxMinor, grossMinor: rung.grossMinor,
  depositMinor: rung.deposit.depositMinor, dispatchOn: rung.dispatchOn,
})
