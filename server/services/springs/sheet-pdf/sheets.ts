import { asArtifact, INNER, layout, PAGE, rule, type Pdf, type TextStyle } from './paper'

/** One field of the title block (ISO 7200), with the columns of twelve it takes. */
export interface TitleField {
  readonly label: string
  readonly value: string
  readonly span: number
}

const HEAD_PT = 34
const TITLE_ROW_PT = 25
const TITLE_ROWS = 2
const SPACE = 8
const HEADING: TextStyle = { sizePt: 9.6, isBold: true }

type Root = ReturnType<Pdf['struct']>

/** The A4 sheets of a document, one after the other: a head that repeats, the place where the next thing goes, and the title block at the foot. */
export class Sheets {
  y = 0
  readonly left = PAGE.left
  private readonly root: Root
  private count = 0

  constructor(private readonly pdf: Pdf, private readonly head: { readonly firm: string, readonly title: string, readonly under: string }) {
    this.root = pdf.struct('Document')
    pdf.addStructure(this.root)
    this.turn()
  }

  /** Hangs an element of the structure under the document. */
  add(element: Root): void {
    this.root.add(element)
  }

  /** Draws what only adorns. */
  adorn(draw: () => void): void {
    asArtifact(this.pdf, draw)
  }

  private get floor(): number {
    return PAGE.bottom - TITLE_ROWS * TITLE_ROW_PT - SPACE
  }

  private turn(): void {
    this.pdf.addPage({ size: 'A4', margin: 0 })
    this.count += 1
    const { pdf, head } = this
    const draw = () => {
      layout(pdf, head.title, INNER * 0.7, { sizePt: this.count === 1 ? 15 : 10, isBold: true }).draw(PAGE.left, PAGE.top + 4)
      layout(pdf, head.firm, INNER * 0.3, { sizePt: 7.6, ink: 'graphite' }, 'right').draw(PAGE.left + INNER * 0.7, PAGE.top + 8)
    }
    asArtifact(pdf, () => rule(pdf, [PAGE.left, PAGE.top], [PAGE.right, PAGE.top], 2))
    if (this.count === 1) this.root.add(pdf.struct('H1', {}, draw))
    else asArtifact(pdf, draw)
    this.y = PAGE.top + (this.count === 1 ? HEAD_PT - 6 : HEAD_PT - 12)
    if (this.count === 1) this.paragraph(head.under, { sizePt: 7.6, ink: 'graphite' })
  }

  /** Turns to a new sheet if that much does not fit on this one. */
  makeRoom(heightPt: number, onNewSheet?: () => void): void {
    if (this.y + heightPt <= this.floor) return
    this.turn()
    onNewSheet?.()
  }

  heading(title: string, keepWithPt: number): void {
    const block = layout(this.pdf, title, INNER, HEADING)
    this.makeRoom(SPACE + block.heightPt + keepWithPt)
    this.y += SPACE
    const { y } = this
    this.root.add(this.pdf.struct('H2', {}, () => block.draw(PAGE.left, y)))
    this.y += block.heightPt + 1
  }

  paragraph(text: string, style: TextStyle): void {
    const block = layout(this.pdf, text, INNER, style)
    this.makeRoom(block.heightPt + 2)
    const { y } = this
    this.root.add(this.pdf.struct('P', {}, () => block.draw(PAGE.left, y)))
    this.y += block.heightPt + 2
  }

  /** A picture with the sentence that names it for those who do not see it. */
  figure(sentence: string, { widthPx, heightPx, ptPerPx }: { widthPx: number, heightPx: number, ptPerPx: number }, draw: () => void): void {
    const heightPt = heightPx * ptPerPx
    this.makeRoom(heightPt)
    const { pdf, y } = this
    this.root.add(pdf.struct('Figure', { alt: sentence }, () => {
      pdf.save().translate(PAGE.left + (INNER - widthPx * ptPerPx) / 2, y).scale(ptPerPx)
      draw()
      pdf.restore()
    }))
    this.y += heightPt
  }

  /** Ends the document: the title block on every sheet, now that their number is known. */
  end(fields: (sheet: string) => readonly TitleField[]): void {
    const { pdf } = this
    for (let at = 0; at < this.count; at += 1) {
      pdf.switchToPage(at)
      asArtifact(pdf, () => this.titleBlock(fields(`${at + 1} of ${this.count}`)))
    }
    this.root.end()
  }

  private titleBlock(fields: readonly TitleField[]): void {
    const { pdf } = this
    const top = PAGE.bottom - TITLE_ROWS * TITLE_ROW_PT
    const column = INNER / 12
    pdf.rect(PAGE.left, top, INNER, TITLE_ROWS * TITLE_ROW_PT).lineWidth(1.6).strokeColor('#16191F').stroke()
    rule(pdf, [PAGE.left, top + TITLE_ROW_PT], [PAGE.right, top + TITLE_ROW_PT], 0.6)
    let at = 0
    for (const { label, value, span } of fields) {
      const row = Math.floor(at / 12)
      const x = PAGE.left + (at % 12) * column
      const y = top + row * TITLE_ROW_PT
      if (at % 12 > 0) rule(pdf, [x, y], [x, y + TITLE_ROW_PT], 0.6)
      layout(pdf, label, span * column - 8, { sizePt: 5.8, ink: 'graphite' }).draw(x + 4, y + 2.5)
      layout(pdf, value, span * column - 8, { sizePt: 8, isBold: true }).draw(x + 4, y + 11)
      at += span
    }
  }
}
