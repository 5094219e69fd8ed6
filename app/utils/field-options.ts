export type FieldOption = { value: string, label: string, help?: string, disabled?: boolean }

/** Choices of a field as a list, whether given as a list, as words, or as an object of value and label. */
export function fieldOptions(given: unknown): FieldOption[] {
  if (Array.isArray(given)) return given.map(option => isOption(option) ? option : { value: String(option), label: String(option) })
  if (typeof given === 'object' && given !== null) return Object.entries(given).map(([value, label]) => ({ value, label: String(label) }))
  return []
}

function isOption(value: unknown): value is FieldOption {
  return typeof value === 'object' && value !== null && 'value' in value && 'label' in value
}
