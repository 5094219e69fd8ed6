import { z } from 'zod'
import { accessKeySchema, pageQuerySchema, reasonSchema, textSchema, versionSchema } from './shared-fields'
import type { CoilHand, MaterialCode, SpringKind, ToleranceGrade } from '../spring/codes'
import type { EvaluationOf, InputOf } from '../spring/mechanics/spring'
import type { LoadPoint, MomentPoint } from '../spring/sizing/types'
import type { OrderState } from './order-states'
import type { PaymentStatus } from './payment'
import type { EnquiryRequest } from './enquiry'

/** A spring as it is quoted and made, of one kind, with the whole check that was made of it. `spring` is what `evaluate` takes. */
export type StoredDesignOf<K extends SpringKind> = {
  kind: K, material: MaterialCode, materialName: string, wireDiameterMm: number, meanDiameterMm: number, activeCoils: number,
  /** Coils wound: total coils of compression springs, body coils of the others. */
  totalCoils: number,
  /** Compression: free length. Extension: inside the hooks. Torsion: the body. */
  freeLengthMm: number,
  hand: CoilHand, toleranceGrade: ToleranceGrade, spring: InputOf<K>, evaluation: EvaluationOf<K>, wiresSearched: number, wiresFeasible: number,
}
export type StoredDesign = { [K in SpringKind]: StoredDesignOf<K> }[SpringKind]

/** What the spring is asked to do: a load at a length, or a moment at an angle. */
export type WorkingPoint = LoadPoint | MomentPoint

/** Why an enquiry waits for a person: a sentence for each side. */
export type GateReason = { code: string, customerText: string, estimatorText: string }

/** One rung of the ladder as a customer sees it: no cost, no margin. */
export type LadderRung = {
  quantity: number, unitPrice: string, netMinor: number, taxMinor: number, grossMinor: number, depositMinor: number, balanceMinor: number, dispatchOn: string | null,
  /** What the next rung would take, for the words beside it. */
  nextStep: { moreSprings: number, moreMinor: number } | null,
}
/** What stands in the way, and single changes that would give a spring. */
export type ConflictView = { words: string, changes: { path: string, label: string, to: number | string, toText: string, unitPrice: string | null }[] }

/** The answer to the order form as one types. */
export type PreviewView = {
  design: StoredDesign | null, conflict: ConflictView | null, currency: string, priceBookNumber: number, priceBookInForceFrom: string, taxPercent: string, depositPercent: string,
  depositBy: string, ladder: LadderRung[], waitsForPerson: Pick<GateReason, 'code' | 'customerText'>[], points: WorkingPoint[],
}
export type EnquiryOutcome = { ref: string, key: string, outcome: 'quoted' | 'waiting', reasons: string[], answerBy: string | null, quoteUrl: string }

/** The quote page. */
export type QuoteView = {
  ref: string, revision: string, state: OrderState, version: number, title: string, firm: string, contactName: string, couldHurt: boolean,
  /** Null while a person still has to answer. */
  design: StoredDesign | null, points: WorkingPoint[], currency: string, taxPercent: string, depositPercent: string,
  validUntil: string | null, depositBy: string | null, sentAt: string | null, checkedBy: string | null, priceBookNumber: number | null, noteToCustomer: string, notes: string[],
  ladder: LadderRung[], acceptedQuantity: number | null, addressConfirmed: boolean, isSignedIn: boolean, maskedEmail: string,
  answerBy: string | null, reasons: string[], payment: PaymentStatus, request: EnquiryRequest['requirement'],
}
/** A key that cannot be one opens nothing, just as a wrong one: the answer is the same 404. */
export const quoteAccessQuerySchema = z.strictObject({ key: accessKeySchema.optional().catch(undefined) })
export const acceptQuoteBodySchema = z.strictObject({ quantity: z.int().min(1).max(1_000_000), version: versionSchema, key: accessKeySchema.optional() })
export type AcceptedQuote = { state: OrderState, version: number, next: 'confirm-address' | 'pay' }
export const declineQuoteBodySchema = z.strictObject({ version: versionSchema, reason: textSchema(500).default(''), key: accessKeySchema.optional() })

/** Estimating: a line of one rung, with the computed amount beside the one in force. */
export type CostLineView = { code: string, label: string, basis: string, rateText: string, computedAmountMinor: number, amountMinor: number, overrideReason: string | null, overriddenBy: string | null, overriddenAt: string | null }
export type EstimateRung = LadderRung & { costMinor: number, marginPercent: string, belowFloor: boolean, lines: CostLineView[] }
export type EstimatingRow = { ref: string, title: string, firm: string, contactName: string, createdAt: string, answerBy: string | null, state: OrderState, reasons: { code: string, text: string }[], worthMinor: number | null, currency: string, assignedTo: string | null }
export type EstimatingList = { rows: EstimatingRow[], nextCursor: string | null, waiting: number }
export type EstimatingView = {
  ref: string, state: OrderState, version: number, title: string, firm: string, contactName: string, contactEmail: string, countryCode: string, createdAt: string, answerBy: string | null, neededOn: string | null,
  request: EnquiryRequest, points: WorkingPoint[], reasons: GateReason[], assignedTo: string | null,
  quote: null | {
    revision: string, state: 'draft' | 'sent' | 'superseded', version: number, design: StoredDesign | null, currency: string, priceBookNumber: number, priceBookInForceFrom: string, taxPercent: string, depositPercent: string,
    computedMarginPercent: string, marginPercentOverride: string | null, marginReason: string | null, marginFloorPercent: string, noteToCustomer: string, validUntil: string, sentAt: string | null, ladder: EstimateRung[],
  },
  conflict: ConflictView | null,
  events: { at: string, who: string, from: OrderState | null, to: OrderState, why: string }[],
}
const moneyMinor = z.int('A whole number of cents.').min(0).max(99_999_999)
/** Replace the amount of one line at one quantity; `amountMinor: null` goes back to the computed one. `version` is the draft's, as in the next two. */
export const overrideLineBodySchema = z.strictObject({ version: versionSchema, quantity: z.int().min(1).max(1_000_000), code: z.string().max(40), amountMinor: moneyMinor.nullable(), reason: reasonSchema })
/** Replace the margin of the whole quote; null goes back to the book's. */
export const overrideMarginBodySchema = z.strictObject({ version: versionSchema, marginPercent: z.number().min(-50).max(95).nullable(), reason: reasonSchema })
export const sendQuoteBodySchema = z.strictObject({ version: versionSchema, noteToCustomer: textSchema(2000).default('') })
/** `version` is the order's, as for revising and taking on. The reason is told to the customer. */
export const withdrawBodySchema = z.strictObject({ version: versionSchema, reason: reasonSchema })
export const estimatingQuerySchema = pageQuerySchema.extend({ state: z.enum(['waiting', 'quoted', 'all']).default('waiting'), q: z.string().trim().max(100).refine(text => !/\p{Cc}/u.test(text), 'One line of text.').default('') })

/** The order as its customer follows it. */
export type OrderRow = { ref: string, title: string, state: OrderState, quantity: number | null, createdAt: string, grossMinor: number | null, currency: string, dispatchOn: string | null }
export type OrderStatusView = {
  ref: string, title: string, firm: string, state: OrderState, version: number, quantity: number | null, currency: string, design: StoredDesign | null, points: WorkingPoint[],
  grossMinor: number | null, depositMinor: number | null, balanceMinor: number | null, paidMinor: number, promisedOn: string | null, quoteRevision: string | null,
  events: { at: string, to: OrderState, why: string }[], operations: { name: string, state: string, finishedAt: string | null }[],
  canPay: 'deposit' | 'balance' | null, payment: PaymentStatus,
}
