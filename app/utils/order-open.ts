import { ORDER_FIELDS, orderFieldId, type OrderFieldName } from './order-fields'

export type OpenItem = { section: number, fieldId: string, words: string }

/** What is still open, one line a section: its fields by name, leading to the first of them. */
export function openItems(fields: Iterable<OrderFieldName>): OpenItem[] {
  const bySection = new Map<number, OrderFieldName[]>()
  for (const field of fields) {
    const { section } = ORDER_FIELDS[field]
    bySection.set(section, [...(bySection.get(section) ?? []), field])
  }
  return [...bySection].sort(([a], [b]) => a - b).map(([section, [first, ...others]]) => {
    const names = [first, ...others].flatMap(field => field ? [ORDER_FIELDS[field].words] : [])
    const unique = [...new Set(names)]
    const words = section === 1 && unique.length > 2 ? (first === 'firstMoment' ? 'Moments and angles' : 'Loads and lengths') : unique.map((name, at) => at ? lowerFirst(name) : name).join(', ')
    return { section, fieldId: first ? orderFieldId(first) : '', words }
  })
}

const lowerFirst = (text: string): string => /^[A-Z]{2}/.test(text) ? text : text.charAt(0).toLowerCase() + text.slice(1)
