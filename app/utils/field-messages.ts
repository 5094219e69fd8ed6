import type { FormKitFrameworkContext } from '@formkit/core'

/** What a field has to say against its value, as far as it may be seen yet. */
export function fieldMessages(context: FormKitFrameworkContext): string[] {
  return Object.values(context.messages).map(message => String(message.value))
}

/** The attributes that tie a control to its hint and to what is wrong with it. */
export function fieldAria(context: FormKitFrameworkContext): Record<string, string | undefined> {
  const isWrong = Object.keys(context.messages).length > 0
  const described = [context.help ? `${context.id}-hint` : '', isWrong ? `${context.id}-why` : ''].filter(Boolean).join(' ')
  return { 'aria-invalid': isWrong ? 'true' : undefined, 'aria-describedby': described || undefined }
}
