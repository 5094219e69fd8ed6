/** A row of a chart's values as a table, for those who do not see the chart. */
export interface ChartRow {
  readonly name: string
  readonly place: string
  readonly load: string
  readonly tolerance: string
}
