import type { EnquiryOutcome } from '#shared/schemas/quote'
import { send, toSendError } from '~/utils/send'
import { ORDER_FIELD_NAMES, orderFieldId, type OrderFieldName } from '~/utils/order-fields'
import type { OrderDraft, ReadDraft } from '~/utils/order-draft'
import { newUuid } from '~/utils/uuid'

export type OrderErrors = Partial<Record<OrderFieldName, string>>
type Attempt = { key: string, body: string }

/**
 * Sends the order form. The schema that the server parses with is loaded at the first attempt and says beforehand what is
 * wrong; the same body is always sent under the same key, so a second click or a retry cannot make a second enquiry.
 */
export function useOrderSubmit({ draft, read }: { draft: () => OrderDraft, read: () => ReadDraft }) {
  const isSending = ref(false)
  const hasTried = ref(false)
  const errors = shallowRef<OrderErrors>({})
  const failure = ref('')
  const outcome = shallowRef<EnquiryOutcome | null>(null)
  let attempt: Attempt | null = null
  let schema: typeof import('#shared/schemas/enquiry')['enquiryRequestSchema'] | null = null

  const body = (units: string) => ({ requirement: read().requirement, contact: read().contact, units, website: draft().website })

  /** What is wrong with the form as it stands, by field; needs the schema to be there. */
  function check(): OrderErrors {
    const { faults, fieldOfPath } = read()
    const found: OrderErrors = { ...faults }
    const parsed = schema?.safeParse(body('metric'))
    for (const issue of parsed?.error?.issues ?? []) {
      const field = findField(issue.path.join('.'), fieldOfPath)
      if (field) found[field] ??= issue.message
    }
    return found
  }

  /** After a first attempt: takes away what has been put right, and adds what is newly wrong except where one is still typing. */
  function recheck(): void {
    if (!hasTried.value || !schema) return
    const found = check()
    const focused = document.activeElement?.closest('.field')
    for (const field of ORDER_FIELD_NAMES) {
      const isTyping = focused?.contains(document.getElementById(orderFieldId(field)))
      if (isTyping && !errors.value[field]) Reflect.deleteProperty(found, field)
    }
    errors.value = found
  }

  async function submit(units: string): Promise<void> {
    if (isSending.value) return
    isSending.value = true
    failure.value = ''
    try {
      schema ??= (await import('#shared/schemas/enquiry')).enquiryRequestSchema
      hasTried.value = true
      errors.value = check()
      if (Object.keys(errors.value).length > 0) return
      const whole = body(units)
      const text = JSON.stringify(whole)
      if (attempt?.body !== text) attempt = { key: newUuid(), body: text }
      outcome.value = await send<EnquiryOutcome>('/api/enquiries', { body: whole, idempotencyKey: attempt.key })
      attempt = null
    }
    catch (caught) {
      const { detail, fieldErrors } = toSendError(caught)
      const found: OrderErrors = {}
      for (const [path, message] of Object.entries(fieldErrors)) {
        const field = findField(path, read().fieldOfPath)
        if (field) found[field] ??= message
      }
      errors.value = found
      failure.value = detail
    }
    finally {
      isSending.value = false
    }
  }

  return { isSending: readonly(isSending), hasTried: readonly(hasTried), errors, failure, outcome, submit, recheck }
}

/** The field of a path, or of the nearest part of the form that holds it. */
function findField(path: string, fieldOfPath: Record<string, OrderFieldName>): OrderFieldName | undefined {
  for (let at = path; at; at = at.slice(0, Math.max(0, at.lastIndexOf('.')))) {
    if (fieldOfPath[at]) return fieldOfPath[at]
  }
  return undefined
}
