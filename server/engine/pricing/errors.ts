export type PriceErrorCode =
  | 'rate-missing' | 'rate-unreadable' | 'quantity-out-of-range' | 'design-unreadable' | 'wire-product-unreadable'
  | 'line-unknown' | 'reason-missing' | 'override-unreadable' | 'price-negative' | 'lot-out-of-range' | 'ladder-too-long'

/** A refusal of the pricing engine. `message` can be shown to staff; `subject` names the rate, line or field at fault. */
export class PriceError extends Error {
  constructor(readonly code: PriceErrorCode, message: string, readonly subject: string) {
    super(message)
    this.name = 'PriceError'
  }
}
