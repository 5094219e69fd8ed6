export { getMaterial, isMaterialCode, listMaterials, minimumTensileStrengthMpa, modulusMpa } from './catalogue'
export { standardDiametersMm } from './stock-diameters'
export { greatestWireDiameterMm, wireDiameterToleranceMm } from './wire-tolerance'
export type { Material, MaterialFamily, Origin, SourcedValue, SteppedModulus, StrengthResult } from './types'
