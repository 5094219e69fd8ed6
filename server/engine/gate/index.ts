export { isUsualShape } from './design-rules'
export { judgeGate } from './judge'
export { cautionGroupOf, materialFamilyOf, readGatePolicy, type CautionGroup, type GatePolicy, type MaterialFamily } from './policy'
export type { GateCheck, GateCode, GateDesign, GateReason, GateRequirement, GateRung } from './types'
