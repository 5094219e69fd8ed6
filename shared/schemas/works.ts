import { z } from 'zod'
import type { RateGroup } from '../rate-groups'
import { pageQuerySchema, textSchema } from './shared-fields'
import { MATERIAL_CODES } from '../spring/codes'

/** A draft is edited until an administrator approves it from a day on; from then it never changes. */
export const PRICE_BOOK_STATES = ['draft', 'approved'] as const

/** One version of the price book with its rates, as Works shows it. Values are decimal text in their own unit. */
export type PriceBookView = { number: number, currency: string, inForceFrom: string, isInForce: boolean, rates: { code: string, label: string, unit: string, group: RateGroup, value: string }[] }
export type PriceBookList = { books: PriceBookView[] }

export const wireQuerySchema = pageQuerySchema.extend({ material: z.enum(MATERIAL_CODES, 'There is no such material.').optional() })

/** A wire product with what lies in the rack, what of it is set aside for jobs and what is free (less than nothing where too much was promised). Masses in kg, decimal text. */
export type WireStockRow = {
  id: string, material: string, materialName: string, wireDiameterMm: number, pricePerKg: string, currency: string,
  stockKg: string, reserved: string, freeKg: string, smallestPurchaseKg: string, leadDays: number, isActive: boolean,
}
/** `materials` are those that have products, whatever the page is filtered by. */
export type WireStockList = { rows: WireStockRow[], materials: { code: string, name: string }[], nextCursor: string | null }

/** Wire that came into the rack. `id` is made by the sender: the same one sent twice counts once. */
export const receiveWireBodySchema = z.strictObject({
  id: z.uuid(),
  massKg: z.number('Give the mass in kg as a number.').min(0.001, 'More than nought.').max(100_000, 'At most 100 000 kg.'),
  note: textSchema(200).default(''),
})
