import { sumMinor, type Currency } from '#shared/money'
import { COST_LINE_CODES, POLICY_LINE_CODES } from '../pricing'
import { actualLineOf, NOT_RECORDED } from './actual-lines'
import type { JobActuals, JobCostComparison, JobCostRow, JobCostTotal, QuotedCostLine } from './types'

const NOT_QUOTED = 'not quoted'
const LABELS: Readonly<Record<(typeof COST_LINE_CODES)[number], string>> = {
  'wire': 'Wire', 'coiling-set-up': 'Coiling, set-up', 'coiling-run': 'Coiling, run', 'stress-relief': 'Stress relief', 'end-grinding': 'End grinding',
  'inspection': 'Inspection', 'certificate': 'Certificate', 'packing': 'Packing and dispatch',
}

/**
 * A job's cost line by line: what the quote said against what was recorded, each actual rounded once. A line without a record
 * shows null, never zero; work and costs nobody quoted get a row of their own. The rows add up to the total exactly.
 */
export function compareJobCost(quotedLines: readonly QuotedCostLine[], actuals: JobActuals, currency: Currency): JobCostComparison {
  const costLines = quotedLines.filter((line) => !POLICY_LINE_CODES.some((code) => code === line.code))
  const rows = costLines.map((line): JobCostRow => {
    const actual = actualLineOf(line.code, actuals, currency)
    return {
      code: line.code,
      label: line.label,
      quotedBasis: line.basis,
      actualBasis: actual?.basis ?? NOT_RECORDED,
      quotedMinor: line.amountMinor,
      actualMinor: actual?.amountMinor ?? null,
      differenceMinor: actual ? actual.amountMinor - line.amountMinor : null,
    }
  })
  const unquoted = listUnquoted(costLines, actuals, currency)
  return { currency, rows: [...rows, ...unquoted], total: buildTotal([...rows, ...unquoted]) }
}

function listUnquoted(costLines: readonly QuotedCostLine[], actuals: JobActuals, currency: Currency): JobCostRow[] {
  const quotedCodes = new Set(costLines.map((line) => line.code))
  const otherCodes = (actuals.other ?? []).map((cost) => cost.lineCode)
  const codes = [...new Set<string>([...COST_LINE_CODES, ...otherCodes])].filter((code) => !quotedCodes.has(code))
  return codes.flatMap((code): JobCostRow[] => {
    const actual = actualLineOf(code, actuals, currency)
    if (!actual) return []
    const label = COST_LINE_CODES.find((known) => known === code)
    return [{
      code,
      label: label ? LABELS[label] : (actuals.other?.find((cost) => cost.lineCode === code)?.label ?? code),
      quotedBasis: NOT_QUOTED,
      actualBasis: actual.basis,
      quotedMinor: 0,
      actualMinor: actual.amountMinor,
      differenceMinor: actual.amountMinor,
    }]
  })
}

function buildTotal(rows: readonly JobCostRow[]): JobCostTotal {
  const recorded = rows.filter((row) => row.actualMinor !== null)
  const notRecorded = rows.filter((row) => row.actualMinor === null).map((row) => row.label)
  return {
    quotedMinor: sumMinor(rows.map((row) => row.quotedMinor)),
    comparedQuotedMinor: sumMinor(recorded.map((row) => row.quotedMinor)),
    actualMinor: sumMinor(recorded.map((row) => row.actualMinor ?? 0)),
    differenceMinor: sumMinor(recorded.map((row) => row.differenceMinor ?? 0)),
    isComplete: notRecorded.length === 0,
    notRecorded,
    words: wordsFor(recorded.length, notRecorded),
  }
}

function wordsFor(recordedCount: number, notRecorded: readonly string[]): string {
  if (notRecorded.length === 0) return 'Every line is recorded.'
  if (recordedCount === 0) return 'Nothing is recorded yet.'
  return `Without ${notRecorded.join('; ')}: not recorded. The difference compares recorded lines only.`
}
