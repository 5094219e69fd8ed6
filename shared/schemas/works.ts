/** One version of the price book with its rates, as Works shows it. Values are decimal text in their own unit. */
export type PriceBookView = { number: number, currency: string, inForceFrom: string, isInForce: boolean, rates: { code: string, label: string, unit: string, value: string }[] }
export type PriceBookList = { books: PriceBookView[] }

/** A wire product with what lies in the rack and what of it is set aside for jobs. Masses in kg, decimal text. */
export type WireStockRow = {
  id: string, material: string, materialName: string, wireDiameterMm: number, pricePerKg: string, currency: string,
  stockKg: string, reserved: string, smallestPurchaseKg: string, leadDays: number, isActive: boolean,
}
export type WireStockList = { rows: WireStockRow[], nextCursor: string | null }
