/** A page of one person's own: never kept by a cache, never listed by a search engine. */
export function usePrivatePage(): void {
  const cacheControl = useResponseHeader('cache-control')
  if (import.meta.server) cacheControl.value = 'no-store'
  useHead({ meta: [{ name: 'robots', content: 'noindex' }] })
}
