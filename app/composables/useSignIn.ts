import { getNode } from '@formkit/core'
import { send, toSendError, type SendError } from '~/utils/send'
import { safeRedirect } from '~/utils/safe-redirect'
import { homeOf } from '~/utils/staff-places'

/** Signing in with a password, or by a link that is e-mailed. Goes on only to a page of our own. */
export function useSignIn() {
  const auth = useAuth()
  const route = useRoute()
  const fields = ref<{ email?: string, password?: string }>({ email: '', password: '' })
  const fieldErrors = shallowRef<Record<string, string>>({})
  const error = shallowRef<SendError | null>(null)
  /** Which of the two ways is being gone. */
  const isBusy = ref<'link' | 'password' | null>(null)
  const isSent = ref(false)

  watch(fieldErrors, found => getNode('sign-in')?.setErrors([], found))

  function findMissing(how: 'link' | 'password'): Record<string, string> {
    const { email = '', password = '' } = fields.value
    return {
      ...(email.trim() === '' ? { email: 'Give your e-mail address.' } : {}),
      ...(how === 'password' && password === '' ? { password: 'Give your password.' } : {}),
    }
  }

  async function signIn(how: 'link' | 'password'): Promise<void> {
    if (isBusy.value) return
    error.value = null
    isSent.value = false
    fieldErrors.value = findMissing(how)
    if (Object.keys(fieldErrors.value).length > 0) return
    isBusy.value = how
    const { email = '', password = '' } = fields.value
    try {
      if (how === 'link') {
        await send('/api/auth/link', { body: { email } })
        isSent.value = true
        return
      }
      await auth.signIn({ email, password }, { redirect: false })
      await navigateTo(safeRedirect(route.query.redirect) ?? homeOf(auth.data.value?.roles ?? []))
    }
    catch (caught) {
      error.value = toSendError(caught)
      fieldErrors.value = { ...error.value.fieldErrors }
    }
    finally {
      isBusy.value = null
    }
  }
  return { fields, fieldErrors, error, isBusy, isSent, signIn }
}
