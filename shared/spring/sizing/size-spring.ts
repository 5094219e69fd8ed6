import { findConflict } from './find-conflict'
import { searchWires, type SearchOptions } from './search-wires'
import type { SizingResult, SizingWire, SpringSizeRequest } from './types'

export interface SizingOptions<W extends SizingWire> extends SearchOptions<W> {
  /** False leaves out why nothing fits: it takes tens of searches. */
  readonly explainConflict?: boolean | undefined
}

/**
 * Sizes a spring of any kind over the wires: the best designs, one for each wire, best first, each passing every stop check;
 * or what clashes and the least changes. Pure and deterministic; the request must have passed `checkSizeRequirement`.
 */
export function sizeSpring<W extends SizingWire>(request: SpringSizeRequest, wires: readonly W[], options: SizingOptions<W> = {}): SizingResult<W> {
  const { designs, searched } = searchWires(request, wires, options)
  const conflict = designs.length === 0 && options.explainConflict !== false ? findConflict(request, wires, options) : null
  return { designs, searched, conflict }
}
