import { MoneyError, splitDeposit, type DepositSplit } from '#shared/money'
import type { Requirement } from '#shared/schemas/enquiry'
import type { CatalogueWire } from '../catalogue/list-wires'
import { priceLadder, rateText, type LadderStep, type PriceBook, type PricedCustomer, type PricedDesign } from '../../engine/pricing'
import { invalid } from '../errors'
import { priceOptionsOf } from '../springs/price-search'
import { HOME_COUNTRY } from './home-country'
import { promiseDispatch } from './promise'
import type { ShopPlan } from './shop-plan'

/** One quantity with its price, what is paid when, and the day it could leave. */
export type WorkedRung = LadderStep & { deposit: DepositSplit, dispatchOn: string | null }

export type PricingInput = {
  design: PricedDesign, wire: CatalogueWire, requirement: Requirement, customer: PricedCustomer, book: PriceBook, plan: ShopPlan, clock: { now: Date, timeZone: string },
}

/**
 * Prices a spring for every quantity that was asked for. Amounts come from the price book alone.
 * @throws DomainError invalid at the quantity whose total no card payment could carry
 */
export function priceDesign({ design, wire, requirement, customer, book, plan, clock }: PricingInput): WorkedRung[] {
  const request = { design, wireProduct: wire, options: priceOptionsOf(requirement), book, customer, homeCountry: HOME_COUNTRY }
  requirement.quantities.forEach((quantity, index) => {
    try {
      priceLadder([quantity], request)
    }
    catch (error) {
      if (error instanceof MoneyError && error.code === 'amount-too-large') throw invalid(`requirement.quantities.${index}`, error.message)
      throw error
    }
  })
  const depositPercent = rateText(book, 'policy.deposit-percent')
  return priceLadder(requirement.quantities, request).map(step => ({
    ...step,
    deposit: splitDeposit(step.grossMinor, depositPercent, book.currency),
    dispatchOn: promiseDispatch({ design, wire, priced: step, book, plan, clock }),
  }))
}
