import { toSendError, type SendError } from '~/utils/send'

/** One thing a button does: busy while it runs, a second click does nothing, and what went wrong is kept to be shown. */
export function useAct<Input extends unknown[]>(act: (...input: Input) => Promise<void>) {
  const isBusy = ref(false)
  const error = shallowRef<SendError | null>(null)

  async function run(...input: Input): Promise<boolean> {
    if (isBusy.value) return false
    isBusy.value = true
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
    }
  }
  return { isBusy: readonly(isBusy), error, run }
}
