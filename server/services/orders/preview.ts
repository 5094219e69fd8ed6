import type { z } from 'zod'
import type { previewBodySchema } from '#shared/schemas/enquiry'
import type { PreviewView } from '#shared/schemas/quote'
import type { ServiceContext } from '../context'
import { addDays } from '../../engine/planning'
import { rateText, readNumberRates, resolveTax } from '../../engine/pricing'
import { toLadder } from '../quotes/ladder'
import { HOME_COUNTRY } from './home-country'
import { rungAmountsOf } from './rung-amounts'
import { shopDayOf } from './shop-plan'
import { workOut } from './work-out'

/** Spring, price and date as one types. Nothing is stored, and no cost or margin is given away. */
export async function previewOrder(context: ServiceContext, { requirement, countryCode }: z.output<typeof previewBodySchema>): Promise<PreviewView> {
  const customer = { country: countryCode, vatNumberGiven: false }
  const worked = await workOut(context, requirement, customer)
  const { book } = worked
  return {
    design: worked.design, conflict: worked.conflict, currency: book.currency, priceBookNumber: book.number, priceBookInForceFrom: book.inForceFrom,
    taxPercent: resolveTax({ book, customer, homeCountry: HOME_COUNTRY }).percent, depositPercent: rateText(book, 'policy.deposit-percent'),
    depositBy: addDays(shopDayOf(context), readNumberRates(book)['policy.deposit-hold-days']),
    ladder: toLadder(worked.rungs.map(rungAmountsOf)),
    // The same words once, however many checks they stand for.
    waitsForPerson: worked.reasons.filter(({ customerText }, at, all) => all.findIndex(other => other.customerText === customerText) === at).map(({ code, customerText }) => ({ code, customerText })),
    points: worked.points,
  }
}
