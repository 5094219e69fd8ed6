import type { ShallowRef } from 'vue'

/** Width of an element in px as it changes; `startPx` on the server and until the page has measured it. */
export function useElementWidth(element: Readonly<ShallowRef<HTMLElement | null>>, startPx: number): Readonly<ShallowRef<number>> {
  const widthPx = shallowRef(startPx)
  let observer: ResizeObserver | undefined
  const measure = (width: number) => {
    // A hidden box has no width; keep the last picture for when it is shown again
    if (width > 0) widthPx.value = Math.floor(width)
  }
  onMounted(() => {
    if (!element.value) return
    measure(element.value.clientWidth)
    observer = new ResizeObserver(([entry]) => {
      if (entry) measure(entry.contentRect.width)
    })
    observer.observe(element.value)
  })
  onBeforeUnmount(() => observer?.disconnect())
  return widthPx
}
