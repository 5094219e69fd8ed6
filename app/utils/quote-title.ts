import type { QuoteView } from '#shared/schemas/quote'
import type { UnitSystem } from '#shared/units/convert'
import { formatLength, formatMass } from '#shared/units/format'
import type { TitleCell } from './title-cell'

/** The title block of a quote's sheet. `day` writes the day of an instant in the shop's zone. */
export function quoteTitleCells(view: QuoteView, { day, units }: { day: (at: string) => string, units: UnitSystem }): TitleCell[] {
  const { design, sentAt } = view
  return [
    { label: 'Legal owner', value: 'Oxmere Spring Works, Lower Forge Yard, Oxmere', span: 4 },
    { label: 'Document', value: design ? 'Quote with drawing' : 'Enquiry', span: 3 },
    { label: 'Number', value: view.ref, span: 3, isBig: true },
    { label: 'Revision', value: view.revision || 'none yet', isBig: true },
    { label: 'Title', value: view.title, span: 4 },
    { label: 'Drawn', value: sentAt ? `from your form, ${day(sentAt)}` : 'not yet', span: 3 },
    { label: 'Checked', value: view.checkedBy && sentAt ? `${view.checkedBy}, ${day(sentAt)}` : design ? 'by rule, all limits kept' : 'not yet', span: 3 },
    { label: 'Scale', value: design ? design.kind === 'torsion' ? 'in proportion' : 'as the length axis' : 'none' },
    { label: 'Made to', value: 'ISO 2162, EN 15800', span: 4 },
    { label: 'Wire, mass', value: design ? `${formatLength(design.evaluation.wireLengthMm, units, { decimals: units === 'inch' ? 1 : 0 })}, ${formatMass(design.evaluation.massG, units)} each` : 'not yet', span: 3 },
    { label: 'Price book', value: view.priceBookNumber === null ? 'not yet' : String(view.priceBookNumber), span: 3 },
    { label: 'Sheet', value: '1 of 1' },
  ]
}
