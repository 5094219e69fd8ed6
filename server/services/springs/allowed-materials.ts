import { MATERIAL_CODES, type MaterialCode } from '#shared/spring/codes'
import { getMaterial } from '#shared/spring/materials'
import type { Requirement } from '#shared/schemas/enquiry'

/** Materials a search may use, and the rule that left some out, in a sentence; null where none was left out. */
export type AllowedMaterials = { materials: readonly MaterialCode[], rule: string | null }

/**
 * Where the customer leaves the material to us: anything where it is dry, stainless where plain steel would rust without a
 * finish. A material that is named is taken as named; the check of the surroundings then says what to mind.
 * Common practice, no source.
 */
export function allowedMaterialsFor({ material, surroundings }: Pick<Requirement, 'material' | 'surroundings'>): AllowedMaterials {
  if (material !== 'any') return { materials: [material], rule: null }
  if (surroundings === 'dry') return { materials: MATERIAL_CODES, rule: null }
  return {
    materials: MATERIAL_CODES.filter(code => getMaterial(code).resistsCorrosion),
    rule: `Surroundings: ${surroundings}. Stainless wire only, since plain steel would rust there without a finish (common practice).`,
  }
}
