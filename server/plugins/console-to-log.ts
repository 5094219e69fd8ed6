const MOST_WORDS = 300

/** What a framework wrote about a request, without its query and without anything as long as a secret of ours. */
const withoutSecrets = (text: string): string => text.replace(/\?\S*/g, '').replace(/[A-Za-z0-9_-]{22,}/g, ':secret').replace(/\s+/g, ' ').trim().slice(0, MOST_WORDS)

/**
 * The framework tells of faults by `console.error`, with the whole address of the request, in which the key of an order or of a
 * link may stand. Here it becomes a line of our log, with neither.
 */
export default defineNitroPlugin(() => {
  console.error = (...parts: unknown[]) => {
    log.error('console', parts.find(part => part instanceof Error), { words: withoutSecrets(parts.filter(part => typeof part === 'string').join(' ')) })
  }
})
