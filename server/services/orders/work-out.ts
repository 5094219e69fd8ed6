import type { Requirement } from '#shared/schemas/enquiry'
import type { ConflictView, GateReason, StoredDesign, WorkingPoint } from '#shared/schemas/quote'
import { listCatalogueWires, type CatalogueWire } from '../catalogue/list-wires'
import type { ServiceContext } from '../context'
import { judgeGate, readGatePolicy } from '../../engine/gate'
import type { PricedCustomer } from '../../engine/pricing'
import { getCurrentPriceBook } from '../price-books/get-current'
import type { StoredPriceBook } from '../price-books/read-book'
import { describeConflictFor } from '../springs/describe-conflict'
import { findDesign } from '../springs/find-design'
import { workingPointsOf } from '../springs/requirement'
import { pricedDesignOf, storedDesignOf, storedEnergyOf } from '../springs/stored-design'
import { priceDesign, type WorkedRung } from './price-design'
import { readShopPlan, type ShopPlan } from './shop-plan'

/** Everything that follows from a requirement before anything is stored: the spring, its prices and dates, and who must look at it. */
export type WorkedOut = {
  book: StoredPriceBook, plan: ShopPlan, points: WorkingPoint[],
  design: StoredDesign | null, wire: CatalogueWire | null, rungs: WorkedRung[],
  /** Null where a spring was found. */
  conflict: ConflictView | null,
  /** Empty means that the quote goes out at once. */
  reasons: GateReason[],
  materialRule: string | null,
}

/**
 * Sizes, prices and judges a requirement with the wire, the prices and the plan of the moment. It writes nothing and opens
 * no transaction, so that a long search holds no connection.
 * @throws DomainError invalid when a quantity is beyond what can be paid at once
 */
export async function workOut(context: ServiceContext, requirement: Requirement, customer: PricedCustomer): Promise<WorkedOut> {
  const [book, wires, plan] = await Promise.all([getCurrentPriceBook(context), listCatalogueWires(context.db), readShopPlan(context.db)])
  const points = workingPointsOf(requirement)
  const { best, result, materialRule } = await findDesign(requirement, { wires, book })
  const priced = { requirement, customer, book, plan, clock: context }

  const design = best ? storedDesignOf(best, result.searched, requirement) : null
  const rungs = best && design
    ? priceDesign({ ...priced, wire: best.wire, design: pricedDesignOf(design) })
    : []
  return {
    book, plan, points, design, wire: best?.wire ?? null, rungs, materialRule,
    conflict: best ? null : describeConflictFor(requirement, result, priced),
    reasons: judge(requirement, design, rungs, book),
  }
}

function judge(requirement: Requirement, design: StoredDesign | null, rungs: readonly WorkedRung[], book: StoredPriceBook): GateReason[] {
  return judgeGate(
    {
      couldHurt: requirement.couldHurt !== 'no', coldestC: requirement.coldestC, hottestC: requirement.hottestC, strokes: requirement.strokes,
      toleranceGrade: requirement.toleranceGrade, surroundings: requirement.surroundings, ...(requirement.neededOn && { neededOn: requirement.neededOn }),
    },
    design && {
      kind: design.kind, material: design.material, wireDiameterMm: design.wireDiameterMm, springIndex: design.evaluation.springIndex,
      // Only what is pressed can bow.
      slenderness: design.kind === 'compression' ? design.freeLengthMm / design.meanDiameterMm : 0, storedEnergyJ: storedEnergyOf(design), checks: design.evaluation.checks,
    },
    rungs,
    readGatePolicy(book),
  )
}
