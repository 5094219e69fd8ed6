import type { DesignQuestion, FoundDesign } from './search-design'
import { sizingThreads } from './sizing-threads'

export type { FoundDesign } from './search-design'

const MOST_KEPT = 40
const kept = new WeakMap<DesignQuestion['wires'], Map<string, Promise<FoundDesign>>>()

/**
 * The spring of the catalogue that does what is asked for at the lowest price, or what stands in the way; worked out on a
 * thread beside the server's. Finding out what clashes takes a while, so the answers to the last questions are kept while
 * wire and prices stay the same, and who asks the same meanwhile waits for the one answer.
 * @throws DomainError unavailable when too many wait already
 */
export function findDesign(requirement: DesignQuestion['requirement'], { wires, book }: Pick<DesignQuestion, 'wires' | 'book'>): Promise<FoundDesign> {
  const found = kept.get(wires) ?? new Map<string, Promise<FoundDesign>>()
  kept.set(wires, found)
  const question = JSON.stringify([book.number, requirement])
  const known = found.get(question)
  if (known) return known
  const answer = sizingThreads.run({ task: 'find-design', question: { requirement, wires, book } })
  const [oldest] = found.keys()
  if (found.size >= MOST_KEPT && oldest !== undefined) found.delete(oldest)
  found.set(question, answer)
  // A refusal is no answer: the next to ask tries again.
  answer.catch(() => found.delete(question))
  return answer
}
