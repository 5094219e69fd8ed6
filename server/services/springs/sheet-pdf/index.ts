import type { SpringInput } from '#shared/spring'
import { sheetNumber, sheetOf } from '#shared/spring/sheet'
import type { UnitSystem } from '#shared/units/convert'
import type { ServiceContext } from '../../context'
import { INNER, newPaper, type SheetFonts } from './paper'
import { chartOf, drawShapes, figureToScale, movedOf, PT_PER_PX } from './picture'
import { Sheets } from './sheets'
import { drawChecks, drawGroup, drawPoints, drawSentences, drawTolerances } from './tables'

export type { SheetFonts } from './paper'

const FIRM = 'Oxmere Spring Works'
const WIDTH_PX = INNER / PT_PER_PX
const TALLEST_PX = { compression: 200, extension: 200, torsion: 300 } as const

/** A spring as its address was read, and the units to print in. */
export interface SheetRequest {
  readonly spring: SpringInput
  readonly query: Readonly<Record<string, string>>
  readonly units: UnitSystem
}

/** The data sheet of a spring as a PDF: the drawing to scale, its chart, every value with its basis, the checks, on A4 sheets. */
export async function printSpringSheet({ now, timeZone }: Pick<ServiceContext, 'now' | 'timeZone'>, { spring, query, units }: SheetRequest, fonts: SheetFonts): Promise<{ pdf: Buffer, fileName: string }> {
  const { evaluation, sheet } = sheetOf(spring)
  const number = sheetNumber(query)
  const pdf = newPaper(fonts, { title: `${sheet.title} ${number}: data sheet`, subject: 'Data sheet of a helical spring', author: FIRM, made: now })
  const whole = collect(pdf)
  const sheets = new Sheets(pdf, { firm: FIRM, title: `${sheet.title}: data sheet`, under: sheet.order })

  const design = movedOf(spring, evaluation)
  const drawn = design && figureToScale(design, { widthPx: WIDTH_PX, tallestPx: TALLEST_PX[spring.kind], units })
  if (drawn) sheets.figure(drawn.figure.sentence, { ...drawn.figure, ptPerPx: PT_PER_PX }, () => drawShapes(pdf, drawn.figure.shapes))
  else sheets.paragraph('These sizes do not make a spring that can be drawn.', { sizePt: 8 })
  const chart = design && chartOf(design, { widthPx: WIDTH_PX * 0.8, units })
  if (chart) sheets.figure(chart.sentence, { ...chart, ptPerPx: PT_PER_PX }, () => drawShapes(pdf, chart.shapes))

  drawPoints(pdf, sheets, sheet.points, units)
  for (const group of sheet.groups) drawGroup(pdf, sheets, group, units)
  drawTolerances(pdf, sheets, sheet.tolerances, units)
  drawChecks(pdf, sheets, sheet.checks, units)
  drawSentences(sheets, 'What is taken for granted', sheet.assumptions)
  drawSentences(sheets, 'With care', sheet.cautions)

  sheets.end(part => [
    { label: 'Legal owner', value: FIRM, span: 4 }, { label: 'Title', value: `${sheet.title}, data sheet`, span: 5 }, { label: 'Number', value: number, span: 3 },
    { label: 'Drawn by', value: 'computed', span: 2 }, { label: 'Approved by', value: 'nobody yet', span: 2 }, { label: 'Date', value: dayIn(now, timeZone), span: 2 }, { label: 'Scale', value: drawn?.scale ?? 'no drawing', span: 2 },
    { label: 'Units', value: units === 'inch' ? 'in, lbf' : 'mm, N', span: 2 }, { label: 'Sheet', value: part, span: 2 },
  ])
  pdf.end()
  return { pdf: await whole, fileName: `${number}.pdf` }
}

/** The day in the shop's zone: 1 Dec 2026. */
const dayIn = (now: Date, timeZone: string): string => new Intl.DateTimeFormat('en-GB', { timeZone, day: 'numeric', month: 'short', year: 'numeric' }).format(now)

function collect(pdf: ReturnType<typeof newPaper>): Promise<Buffer> {
  const parts: Buffer[] = []
  return new Promise((resolve, reject) => {
    pdf.on('data', (part: Buffer) => parts.push(part))
    pdf.on('end', () => resolve(Buffer.concat(parts)))
    pdf.on('error', reject)
  })
}
