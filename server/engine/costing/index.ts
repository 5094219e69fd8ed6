export { compareJobCost } from './compare'
export { NOT_RECORDED } from './actual-lines'
export type { JobActuals, JobCostComparison, JobCostRow, JobCostTotal, OtherCost, QuotedCostLine, RecordedMinutes } from './types'
