import { cautionGroupOf, materialFamilyOf, type GatePolicy } from './policy'
import type { GateDesign, GateReason } from './types'

/** A figure as a person writes it, without idle zeros: 4.1, 12, 0.35. */
export function figure(value: number, digits = 1): string {
  return String(Number(value.toFixed(digits)))
}

/** A figure that must not read as if it were inside the limit it breaks: 12.04 against 12 keeps its digits. */
function outside(value: number, limit: number, digits: number): string {
  const short = figure(value, digits)
  return Number(short) === limit ? figure(value, digits + 3) : short
}

/** True for a spring whose index, wire and slenderness are quoted at once. Fast: sizing asks it about every candidate. */
export function isUsualShape({ springIndex, wireDiameterMm, slenderness }: Pick<GateDesign, 'springIndex' | 'wireDiameterMm' | 'slenderness'>, policy: GatePolicy): boolean {
  return springIndex >= policy.indexMin && springIndex <= policy.indexMax && wireDiameterMm >= policy.wireMinMm && wireDiameterMm <= policy.wireMaxMm && slenderness <= policy.slendernessMax
}

/** Rules about the spring itself. */
export function judgeDesign(design: GateDesign, policy: GatePolicy): GateReason[] {
  return [...judgeGeometry(design, policy), ...judgeEnergy(design, policy), ...judgeMaterial(design, policy), ...judgeChecks(design, policy)]
}

function judgeGeometry(design: GateDesign, policy: GatePolicy): GateReason[] {
  if (isUsualShape(design, policy)) return []
  const { springIndex, wireDiameterMm, slenderness } = design
  const reasons: GateReason[] = []
  if (springIndex < policy.indexMin || springIndex > policy.indexMax) {
    const limit = springIndex < policy.indexMin ? policy.indexMin : policy.indexMax
    reasons.push({
      code: 'index',
      customerText: springIndex < policy.indexMin
        ? 'The coils are tight for their wire, so a person checks how it can be wound.'
        : 'The coils are wide for their wire, so a person checks how it can be wound.',
      estimatorText: `Index ${outside(springIndex, limit, 1)} is outside ${figure(policy.indexMin)} to ${figure(policy.indexMax)}, where coiling is sure.`,
    })
  }
  if (wireDiameterMm < policy.wireMinMm || wireDiameterMm > policy.wireMaxMm) {
    const limit = wireDiameterMm < policy.wireMinMm ? policy.wireMinMm : policy.wireMaxMm
    reasons.push({
      code: 'wire-range',
      customerText: 'The wire is finer or thicker than we quote without a person looking.',
      estimatorText: `Wire of ${outside(wireDiameterMm, limit, 2)} mm is outside ${figure(policy.wireMinMm, 2)} to ${figure(policy.wireMaxMm, 2)} mm.`,
    })
  }
  if (slenderness > policy.slendernessMax) {
    reasons.push({
      code: 'slenderness',
      customerText: 'The spring is long for its width and may bow out, so a person checks how it is guided.',
      estimatorText: `Free length over mean diameter is ${outside(slenderness, policy.slendernessMax, 1)}, over ${figure(policy.slendernessMax)}.`,
    })
  }
  return reasons
}

// A compression spring is held between its seats; the others fly or whip round when what holds them gives way (common practice, no source).
function judgeEnergy({ kind, storedEnergyJ }: GateDesign, policy: GatePolicy): GateReason[] {
  if (kind === 'compression' || storedEnergyJ <= policy.energyMaxJ) return []
  const what = kind === 'extension' ? { end: 'a hook', does: 'it would fly' } : { end: 'a leg', does: 'it would whip round' }
  return [{
    code: 'stored-energy',
    customerText: `At work it holds much energy: if ${what.end} gave way, ${what.does}. A person looks at how it is held.`,
    estimatorText: `It holds ${outside(storedEnergyJ, policy.energyMaxJ, 1)} J at its greatest load, over ${figure(policy.energyMaxJ)} J. Ask how it is held and guarded.`,
  }]
}

function judgeMaterial({ material }: GateDesign, policy: GatePolicy): GateReason[] {
  if (policy.allowedFamilies.has(materialFamilyOf(material))) return []
  return [{
    code: 'material',
    customerText: 'This material is one we price by hand.',
    estimatorText: `${material} is not a material that is quoted at once.`,
  }]
}

function judgeChecks({ checks }: GateDesign, policy: GatePolicy): GateReason[] {
  return checks.flatMap((check): GateReason[] => {
    if (check.ok || check.severity === 'note') return []
    if (check.severity === 'stop') {
      return [{ code: 'check-failed', customerText: 'One of our checks of the spring does not hold, so a person looks at it.', estimatorText: `Check ${check.code} fails: ${check.message}` }]
    }
    // The index has its own rule, narrower than the check's.
    if (check.code === 'index' || policy.allowedCautions.has(cautionGroupOf(check.code))) return []
    return [{ code: 'caution', customerText: 'One of our checks of the spring asks for care, so a person looks at it.', estimatorText: `Mind ${check.code}: ${check.message}` }]
  })
}
