import { invalidRequest } from './errors'
import type { CreatedFilter } from './params'

/** One page of a list. */
export interface ListPage<T> { object: 'list', data: T[], has_more: boolean, url: string }

const DEFAULT_LIMIT = 10

/** Whether an instant (seconds) lies in the wanted range. */
export function matchesCreated(createdS: number, filter: CreatedFilter | undefined): boolean {
  if (!filter) return true
  return (filter.gt === undefined || createdS > filter.gt) && (filter.gte === undefined || createdS >= filter.gte)
    && (filter.lt === undefined || createdS < filter.lt) && (filter.lte === undefined || createdS <= filter.lte)
}

function positionOf(items: readonly { id: string }[], id: string, param: string): number {
  const position = items.findIndex(item => item.id === id)
  if (position < 0) throw invalidRequest(`No such object in this list: '${id}'`, { code: 'resource_missing', param })
  return position
}

/**
 * One page, newest first, of items given oldest first (FK-3). `starting_after` goes on towards older ones; `ending_before`
 * answers the page that ends just before that item, still newest first.
 */
export function listPage<T extends { id: string }>(
  oldestFirst: readonly T[], url: string, page: { limit?: number, starting_after?: string, ending_before?: string },
): ListPage<T> {
  if (page.starting_after !== undefined && page.ending_before !== undefined) {
    throw invalidRequest('You may only specify one of these parameters: ending_before, starting_after.', { code: 'parameters_exclusive', param: 'ending_before' })
  }
  const items = [...oldestFirst].reverse()
  const limit = page.limit ?? DEFAULT_LIMIT
  if (page.ending_before !== undefined) {
    const end = positionOf(items, page.ending_before, 'ending_before')
    const start = Math.max(0, end - limit)
    return { object: 'list', data: items.slice(start, end), has_more: start > 0, url }
  }
  const start = page.starting_after === undefined ? 0 : positionOf(items, page.starting_after, 'starting_after') + 1
  return { object: 'list', data: items.slice(start, start + limit), has_more: start + limit < items.length, url }
}
