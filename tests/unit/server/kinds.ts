import { requirementSchema, type Requirement, type RequirementInput } from '#shared/schemas/enquiry'
import type { StoredDesign } from '#shared/schemas/quote'
import type { MaterialCode } from '#shared/spring/codes'
import { sizeSpring } from '#shared/spring/sizing'
import { sizeRequestOf } from '#server/services/springs/requirement'
import { storedDesignOf } from '#server/services/springs/stored-design'

const usual = { couldHurt: 'no' as const, quantities: [100] }
/** A usual requirement of each kind, with the wire that does it. */
export const NEEDS = {
  compression: { ...usual, kind: 'compression', need: { knows: 'two-loads', first: { forceN: 60, lengthMm: 50 }, second: { forceN: 150, lengthMm: 35 } }, boreMm: 26 },
  extension: { ...usual, kind: 'extension', need: { knows: 'two-loads', first: { forceN: 20, lengthMm: 60 }, second: { forceN: 60, lengthMm: 90 } }, boreMm: 20 },
  torsion: { ...usual, kind: 'torsion', need: { knows: 'two-moments', first: { momentNmm: 300, angleDeg: 20 }, second: { momentNmm: 900, angleDeg: 110 } }, firstLegMm: 25, secondLegMm: 30, rodMm: 8 },
} satisfies Record<Requirement['kind'], RequirementInput>
const WIRES = { compression: 2.5, extension: 1.6, torsion: 2 } as const

/** A spring as it is kept with a quote, of one wire. */
export function keptDesign(need: RequirementInput, material: MaterialCode = 'EN10270-1-SM', wireDiameterMm: number = WIRES[need.kind]): StoredDesign {
  const requirement = requirementSchema.parse(need)
  const { designs: [best], searched } = sizeSpring(sizeRequestOf(requirement, 1), [{ id: 'the wire', material, wireDiameterMm }], { explainConflict: false })
  if (!best) throw new Error(`no ${need.kind} spring of ${material} ${wireDiameterMm}`)
  return storedDesignOf(best, searched, requirement)
}
