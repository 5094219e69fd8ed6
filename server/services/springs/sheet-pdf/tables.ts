import type { UnitSystem } from '#shared/units/convert'
import { formulaRuns, writeSheetValue, type SheetCheck, type SheetGroup, type SheetPoints, type SheetRow, type SheetTolerance } from '#shared/spring/sheet'
import { formatNumber } from '#shared/units/format'
import type { Sheets } from './sheets'
import { INNER, layout, rule, type Block, type Ink, type Pdf, type TextStyle } from './paper'

const CELL: TextStyle = { sizePt: 7.6 }
const QUIET: TextStyle = { sizePt: 7.2, ink: 'graphite' }
const HEAD: TextStyle = { sizePt: 6.6, ink: 'graphite' }
const PAD = 2.1
const GAP = 9
/** A longer word than this is a sentence, and takes the room of the formula too. */
const LONGEST_WORD = 18

interface Column {
  readonly head: string
  readonly widthPt: number
  readonly align?: 'left' | 'right'
}

/** One row of cells, each laid out for its column, kept together on one sheet and named as a row to whoever reads aloud. */
class Table {
  private readonly table

  constructor(private readonly pdf: Pdf, private readonly sheets: Sheets, private readonly columns: readonly Column[]) {
    this.table = pdf.struct('Table')
    sheets.add(this.table)
  }

  head(keepWithPt = 30): void {
    const blocks = this.columns.map(({ head, widthPt, align }) => layout(this.pdf, head, widthPt, HEAD, align))
    this.place(blocks, 'TH', 'ink', 0.9, keepWithPt)
  }

  row(blocks: readonly Block[]): void {
    this.place(blocks, 'TD', 'rule', 0.5, 0, () => this.head(0))
  }

  cell(at: number, text: string | Parameters<typeof layout>[1], style: TextStyle = CELL): Block {
    const { widthPt = 0, align } = this.columns[at] ?? {}
    return layout(this.pdf, text, widthPt, style, align)
  }

  /** A cell that takes its own column and the next. */
  wideCell(at: number, text: string): Block {
    const widthPt = (this.columns[at]?.widthPt ?? 0) + GAP + (this.columns[at + 1]?.widthPt ?? 0)
    return layout(this.pdf, text, widthPt, CELL)
  }

  end(): void {
    this.table.end()
  }

  private place(blocks: readonly Block[], tag: 'TH' | 'TD', ink: Ink, linePt: number, keepWithPt: number, onNewSheet?: () => void): void {
    const heightPt = Math.max(...blocks.map(block => block.heightPt)) + 2 * PAD
    this.sheets.makeRoom(heightPt + keepWithPt, onNewSheet)
    const { pdf, sheets } = this
    const row = pdf.struct('TR')
    this.table.add(row)
    let x = sheets.left
    blocks.forEach((block, at) => {
      row.add(pdf.struct(tag, {}, () => block.draw(x, sheets.y + PAD)))
      x += (this.columns[at]?.widthPt ?? 0) + GAP
    })
    row.end()
    sheets.y += heightPt
    sheets.adorn(() => rule(pdf, [sheets.left, sheets.y], [sheets.left + INNER, sheets.y], linePt, ink))
  }
}

const widths = (...shares: readonly number[]): number[] => {
  const room = INNER - GAP * (shares.length - 1)
  const sum = shares.reduce((total, share) => total + share, 0)
  return shares.map(share => (room * share) / sum)
}
const columns = (heads: readonly string[], shares: readonly number[], right: readonly number[]): Column[] =>
  widths(...shares).map((widthPt, at) => ({ head: heads[at] ?? '', widthPt, align: right.includes(at) ? 'right' : 'left' }))

const isNumber = ({ value }: SheetRow): boolean => typeof value === 'number' || value === null

/** The values of one group, each with its formula and basis. */
export function drawGroup(pdf: Pdf, sheets: Sheets, group: SheetGroup, units: UnitSystem): void {
  sheets.heading(group.title, 50)
  const table = new Table(pdf, sheets, columns(['Symbol', 'Quantity', 'Value', 'Formula', 'Basis'], [7, 27, 19, 31, 30], [2]))
  table.head()
  for (const row of group.rows) {
    const value = writeSheetValue(row.value, row.quantity, units)
    const isSentence = !isNumber(row) && row.formula === '' && value.length > LONGEST_WORD
    table.row([
      table.cell(0, formulaRuns(row.symbol)), table.cell(1, row.name), isSentence ? table.wideCell(2, value) : table.cell(2, value, { ...CELL, isBold: isNumber(row) }),
      table.cell(3, formulaRuns(row.formula), QUIET), table.cell(4, formulaRuns(row.basis), QUIET),
    ])
  }
  table.end()
}

/** The working points side by side, and under them how each column follows. */
export function drawPoints(pdf: Pdf, sheets: Sheets, points: SheetPoints, units: UnitSystem): void {
  if (points.rows.length === 0) return
  sheets.heading('Working points', 60)
  const shares = points.columns.map(() => 1)
  const table = new Table(pdf, sheets, columns(['Point', ...points.columns.map(column => column.name)], [0.6, ...shares], points.columns.map((_, at) => at + 1)))
  table.head()
  points.rows.forEach((row, i) => {
    table.row([table.cell(0, String(i + 1)), ...points.columns.map((column, at) => table.cell(at + 1, writeSheetValue(row[at] ?? null, column.quantity, units), { ...CELL, isBold: true }))])
  })
  table.end()
  const bases = new Table(pdf, sheets, columns(['Symbol', 'Column', 'Formula', 'Basis'], [7, 30, 40, 37], []))
  bases.head(12)
  for (const { symbol, name, formula, basis } of points.columns) bases.row([bases.cell(0, formulaRuns(symbol)), bases.cell(1, name), bases.cell(2, formulaRuns(formula), QUIET), bases.cell(3, formulaRuns(basis), QUIET)])
  bases.end()
}

const VERDICTS = { stop: ['FAILS', 'stop'], caution: ['caution', 'caution'], note: ['note', 'graphite'] } as const satisfies Record<string, readonly [string, Ink]>

/** Every check with its value, its limit and its sentence. */
export function drawChecks(pdf: Pdf, sheets: Sheets, checks: readonly SheetCheck[], units: UnitSystem): void {
  sheets.heading('Checks', 50)
  const table = new Table(pdf, sheets, columns(['Check', 'Verdict', 'Value', 'Limit', 'In words, with its basis (SI)'], [24, 9, 13, 13, 55], [2, 3]))
  table.head()
  for (const check of checks) {
    const [verdict, ink] = check.ok ? ['passes', 'sound'] as const : VERDICTS[check.severity]
    const number = (value: number | null) => (check.unit ? writeSheetValue(value, check.unit, units) : '')
    table.row([table.cell(0, check.name), table.cell(1, verdict, { ...CELL, isBold: !check.ok, ink }), table.cell(2, number(check.value)), table.cell(3, number(check.limit)), table.cell(4, check.message, QUIET)])
  }
  table.end()
}

/** What the tolerance grade allows. */
export function drawTolerances(pdf: Pdf, sheets: Sheets, tolerances: readonly SheetTolerance[], units: UnitSystem): void {
  sheets.heading('Tolerances', 40)
  if (tolerances.length === 0) return sheets.paragraph('None are published for this spring.', QUIET)
  const table = new Table(pdf, sheets, columns(['Symbol', 'Of', 'Nominal', 'Plus or minus', 'Grade', 'Basis'], [7, 32, 17, 17, 7, 34], [2, 3, 4]))
  table.head()
  for (const { symbol, name, nominal, plusMinus, unit, grade, source } of tolerances) {
    table.row([
      table.cell(0, formulaRuns(symbol)), table.cell(1, name), table.cell(2, writeSheetValue(nominal, unit, units)), table.cell(3, `±${writeSheetValue(plusMinus, unit, units)}`, { ...CELL, isBold: true }),
      table.cell(4, formatNumber(grade)), table.cell(5, source, QUIET),
    ])
  }
  table.end()
}

/** Sentences one under the other. */
export function drawSentences(sheets: Sheets, title: string, sentences: readonly string[]): void {
  sheets.heading(title, 30)
  for (const sentence of sentences) sheets.paragraph(sentence, CELL)
}

