import { HOOK_FORMS, LEG_FORMS, SPRING_KINDS } from '#shared/spring/codes'
import type { UnitSystem } from '#shared/units/convert'
import { emptyDraft, type OrderDraft, type WrittenBySystem } from './order-draft'
import { ORDER_FIELD_NAMES } from './order-fields'
import { readShelf, type KindShelf } from './order-shelf'

/** The order form as it is kept on the device. */
export type KeptDraft = { draft: Partial<OrderDraft>, units: UnitSystem, keptAt: string, written: WrittenBySystem, shelf: KindShelf }

/** Fields whose choice decides what the form shows: a word it does not know would leave it without its questions. */
const CHOICES: Partial<Record<keyof OrderDraft, readonly string[]>> = {
  kind: SPRING_KINDS, hook: HOOK_FORMS, legForm: LEG_FORMS, load: ['winds-up', 'opens'],
  knows: ['two-loads', 'load-and-rate', 'rate-and-length'], knowsExtension: ['two-loads', 'load-and-rate', 'load-and-length'], knowsTorsion: ['two-moments', 'moment-and-rate', 'moment-from-free'],
}

/** A kept draft as far as it has the form of one, null for none. What an older or damaged one lacks stays as the empty form has it. */
export function readKept(text: string | null): KeptDraft | null {
  const value = parseObject(text)
  if (!value || !isObject(value.draft) || typeof value.keptAt !== 'string' || value.keptAt === '') return null
  const draft: Record<string, unknown> = {}
  for (const [field, usual] of Object.entries(emptyDraft())) {
    const given = value.draft[field]
    const known = CHOICES[field as keyof OrderDraft]
    if (typeof given === typeof usual && (!known || known.includes(given as string))) draft[field] = given
  }
  return { draft, units: value.units === 'inch' ? 'inch' : 'metric', keptAt: value.keptAt, written: readWritten(value.written), shelf: readShelf(value.shelf, readWritten) }
}

function readWritten(value: unknown): WrittenBySystem {
  const written: WrittenBySystem = {}
  if (!isObject(value)) return written
  for (const field of ORDER_FIELD_NAMES) {
    const one = value[field]
    if (isObject(one) && typeof one.text === 'string' && typeof one.valueSi === 'number' && Number.isFinite(one.valueSi)) written[field] = { text: one.text, valueSi: one.valueSi }
  }
  return written
}

function parseObject(text: string | null): Record<string, unknown> | null {
  try {
    const value: unknown = JSON.parse(text ?? 'null')
    return isObject(value) ? value : null
  }
  catch {
    return null
  }
}
const isObject = (value: unknown): value is Record<string, unknown> => typeof value === 'object' && value !== null
