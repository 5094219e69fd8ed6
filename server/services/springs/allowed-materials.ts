import { MATERIAL_CODES, type MaterialCode } from '#shared/spring/codes'
import { getMaterial } from '#shared/spring/materials'
import type { Requirement } from '#shared/schemas/enquiry'

/** Materials a search may use, and the rule that left some out, in a sentence; null where none was left out. */
export type AllowedMaterials = { materials: readonly MaterialCode[], rule: string | null }

/**
 * Where the customer leaves the material to us: anything where it is dry, else what does not rust: stainless and copper alloys.
 * Copper alloys cost more, so that the price leaves them out unless nothing else does it. A material that is named is taken as
 * named; the check of the surroundings then says what to mind. Common practice, no source.
 */
export function allowedMaterialsFor({ material, surroundings }: Pick<Requirement, 'material' | 'surroundings'>): AllowedMaterials {
  if (material !== 'any') return { materials: [material], rule: null }
  if (surroundings === 'dry') return { materials: MATERIAL_CODES, rule: null }
  return {
    materials: MATERIAL_CODES.filter(code => getMaterial(code).resistsCorrosion),
    rule: `Surroundings: ${surroundings}. Only wire that does not rust, stainless or a copper alloy, since plain steel would without a finish (common practice).`,
  }
}
