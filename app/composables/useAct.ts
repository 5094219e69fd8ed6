import { toSendError, type SendError } from '~/utils/send'

/**
 * One thing a button does: busy while it runs, a second click does nothing, and what went wrong is kept to be shown. In a list `on`
 * is the row it runs on, so that its button alone says so.
 */
export function useAct<Input extends unknown[]>(act: (...input: Input) => Promise<void>) {
  const isBusy = ref(false)
  const error = shallowRef<SendError | null>(null)
  const on = shallowRef<Input[0] | null>(null)

  async function run(...input: Input): Promise<boolean> {
    if (isBusy.value) return false
    isBusy.value = true
    on.value = input[0] ?? null
    error.value = null
    try {
      await act(...input)
      return true
    }
    catch (caught) {
      error.value = toSendError(caught)
      return false
    }
    finally {
      isBusy.value = false
      on.value = null
    }
  }
  return { isBusy: readonly(isBusy), on, error, run }
}
