/** True while the page of an error is rendered or taken over by the browser; its address must not be judged a second time. */
export function isShowingError(): boolean {
  return Boolean(useError().value) && (import.meta.server || Boolean(useNuxtApp().isHydrating))
}
