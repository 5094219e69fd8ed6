type Field = HTMLInputElement | HTMLTextAreaElement | HTMLSelectElement
type Typed = { value: string, checked: boolean | null }

const isField = (element: unknown): element is Field => element instanceof HTMLInputElement || element instanceof HTMLTextAreaElement || element instanceof HTMLSelectElement
const isTicked = (field: Field): field is HTMLInputElement => field instanceof HTMLInputElement && (field.type === 'radio' || field.type === 'checkbox')
const read = (field: Field): Typed => ({ value: field.value, checked: isTicked(field) ? field.checked : null })
/** Whether it holds something else than the page came with: from fast fingers, a password manager, or going back. */
function isChanged(field: Field): boolean {
  if (isTicked(field)) return field.checked !== field.defaultChecked
  return !(field instanceof HTMLSelectElement) && field.value !== field.defaultValue
}

/**
 * What was typed before the page came alive is kept: hydration sets each field to the value that the server knew, so
 * the fields are read before it, and told again what stood in them after it.
 */
export default defineNuxtPlugin((nuxtApp) => {
  const typed = new Map<string, Typed>()
  for (const field of document.querySelectorAll('input, textarea')) if (isField(field) && field.id && isChanged(field)) typed.set(field.id, read(field))
  const listen = ({ target }: Event) => { if (isField(target) && target.id) typed.set(target.id, read(target)) }
  document.addEventListener('input', listen, true)

  nuxtApp.hooks.hookOnce('app:suspense:resolve', async () => {
    await nextTick()
    document.removeEventListener('input', listen, true)
    for (const [id, { value, checked }] of typed) {
      const field = document.getElementById(id)
      if (!isField(field)) continue
      if (isTicked(field)) {
        if (checked === null || field.checked === checked) continue
        field.checked = checked
        field.dispatchEvent(new Event('change', { bubbles: true }))
      }
      else if (field.value !== value) {
        field.value = value
        field.dispatchEvent(new Event(field instanceof HTMLSelectElement ? 'change' : 'input', { bubbles: true }))
      }
    }
  })
})
