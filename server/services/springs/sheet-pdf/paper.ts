import PDFDocument from 'pdfkit'
import type { FormulaRun } from '#shared/spring/sheet'

/** The fonts of a printed sheet as files: Work Sans in two weights, and Greek for symbols. */
export interface SheetFonts {
  readonly regular: Buffer
  readonly bold: Buffer
  readonly greek: Buffer
}

// A4 in points, with the margins of ISO 5457: 20 mm to bind at, 10 mm elsewhere.
export const MM = 72 / 25.4
export const PAGE = { width: 595.28, height: 841.89, left: 20 * MM, right: 595.28 - 10 * MM, top: 10 * MM, bottom: 841.89 - 10 * MM } as const
export const INNER = PAGE.right - PAGE.left

export const INKS = { ink: '#16191F', graphite: '#474E58', rule: '#C9CDC8', steel: '#1D4A76', stop: '#A3231B', caution: '#855000', sound: '#23613F' } as const
export type Ink = keyof typeof INKS

export type Pdf = InstanceType<typeof PDFDocument>

/** An empty document of A4 sheets with its fonts; pages are kept until the end, when their number is known. */
export function newPaper(fonts: SheetFonts, info: { readonly title: string, readonly subject: string, readonly author: string, readonly made: Date }): Pdf {
  const pdf = new PDFDocument({
    size: 'A4', margin: 0, bufferPages: true, autoFirstPage: false, tagged: true, lang: 'en-GB', displayTitle: true, pdfVersion: '1.7',
    info: { Title: info.title, Subject: info.subject, Author: info.author, Creator: 'Wirewright', CreationDate: info.made },
  })
  pdf.registerFont('regular', fonts.regular)
  pdf.registerFont('bold', fonts.bold)
  pdf.registerFont('greek', fonts.greek)
  return pdf
}

export interface TextStyle {
  readonly sizePt: number
  readonly isBold?: boolean
  readonly ink?: Ink
}

// What the embedded fonts lack, in characters that they have.
const REPLACED: readonly (readonly [RegExp, string])[] = [[/[\u202F\u2009]/g, '\u00A0'], [/\u2300/g, 'Ø'], [/\u2011/g, '-'], [/≤/g, '<=']]
const GREEK = /[\u0370-\u03FF]+/

/** Text as the sheet's fonts can set it. */
export const settable = (text: string): string => REPLACED.reduce((result, [from, to]) => result.replace(from, to), text)

interface Piece {
  readonly text: string
  readonly font: string
  readonly sizePt: number
  readonly dropPt: number
  readonly widthPt: number
}

const POWER_SIZE = 0.7

/** Cuts runs into pieces of one font; a word is what may not be parted at a line's end. */
function wordsOf(pdf: Pdf, runs: readonly FormulaRun[], style: TextStyle): Piece[][] {
  const words: Piece[][] = [[]]
  for (const { text, style: place } of runs) {
    settable(text).split(/( +)/).forEach((part) => {
      if (part === '') return
      if (part.trim() === '') return void words.push([])
      for (const [segment] of part.matchAll(new RegExp(`${GREEK.source}|[^\\u0370-\\u03FF]+`, 'g'))) {
        const font = GREEK.test(segment) ? 'greek' : style.isBold ? 'bold' : 'regular'
        const sizePt = style.sizePt * (place ? POWER_SIZE : 1)
        const widthPt = pdf.font(font).fontSize(sizePt).widthOfString(segment)
        words.at(-1)?.push({ text: segment, font, sizePt, dropPt: place === 'power' ? -0.36 * style.sizePt : place === 'index' ? 0.16 * style.sizePt : 0, widthPt })
      }
    })
  }
  return words.filter(word => word.length > 0)
}

/** Lettering laid out in lines for a width, ready to be drawn: its height is known before. */
export interface Block {
  readonly heightPt: number
  readonly draw: (xPt: number, yPt: number) => void
}

export const LEADING = 1.28

/** Lays out runs from the left, or to the right where `align` says so. */
export function layout(pdf: Pdf, runs: readonly FormulaRun[] | string, widthPt: number, style: TextStyle, align: 'left' | 'right' = 'left'): Block {
  const words = wordsOf(pdf, typeof runs === 'string' ? [{ text: runs }] : runs, style)
  const spacePt = pdf.font(style.isBold ? 'bold' : 'regular').fontSize(style.sizePt).widthOfString(' ')
  const lines: { pieces: { piece: Piece, xPt: number }[], widthPt: number }[] = []
  for (const word of words) {
    const wordPt = word.reduce((sum, piece) => sum + piece.widthPt, 0)
    let line = lines.at(-1)
    if (!line || line.widthPt + spacePt + wordPt > widthPt) {
      line = { pieces: [], widthPt: 0 }
      lines.push(line)
    }
    let xPt = line.pieces.length > 0 ? line.widthPt + spacePt : 0
    for (const piece of word) {
      line.pieces.push({ piece, xPt })
      xPt += piece.widthPt
    }
    line.widthPt = xPt
  }
  const lineHeight = style.sizePt * LEADING
  return {
    heightPt: Math.max(1, lines.length) * lineHeight,
    draw: (x, y) => {
      pdf.fillColor(INKS[style.ink ?? 'ink'])
      lines.forEach((line, at) => {
        const fromPt = align === 'right' ? x + widthPt - line.widthPt : x
        for (const { text, gap } of joined(line.pieces)) {
          const first = gap.piece
          // From the base line, so that pieces of different fonts and sizes stand on one line
          pdf.font(first.font).fontSize(first.sizePt).text(text, fromPt + gap.xPt, y + at * lineHeight + style.sizePt + first.dropPt, { lineBreak: false, baseline: 'alphabetic' })
        }
      })
    },
  }
}

/** Neighbours of one font are drawn as one text, with the spaces between them, so that it can be searched and read aloud. */
function joined(pieces: readonly { piece: Piece, xPt: number }[]): { text: string, gap: { piece: Piece, xPt: number } }[] {
  const drawn: { text: string, gap: { piece: Piece, xPt: number }, endPt: number }[] = []
  for (const gap of pieces) {
    const last = drawn.at(-1)
    const isNext = last && last.gap.piece.font === gap.piece.font && last.gap.piece.sizePt === gap.piece.sizePt && last.gap.piece.dropPt === gap.piece.dropPt
    if (last && isNext) {
      last.text += (gap.xPt > last.endPt + 0.01 ? ' ' : '') + gap.piece.text
      last.endPt = gap.xPt + gap.piece.widthPt
    }
    else drawn.push({ text: gap.piece.text, gap, endPt: gap.xPt + gap.piece.widthPt })
  }
  return drawn
}

/** A straight line. */
export function rule(pdf: Pdf, from: readonly [number, number], to: readonly [number, number], widthPt: number, ink: Ink = 'ink'): void {
  pdf.moveTo(...from).lineTo(...to).lineWidth(widthPt).undash().strokeColor(INKS[ink]).stroke()
}

/** What repeats on every sheet or only adorns it: readers that read aloud pass over it. */
export function asArtifact(pdf: Pdf, draw: () => void): void {
  pdf.markContent('Artifact', { type: 'Layout' })
  draw()
  pdf.endMarkedContent()
}
