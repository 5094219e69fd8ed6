import type { SpringKind } from '../codes'
import { COMPRESSION_SEARCH } from './compression/search'
import { EXTENSION_SEARCH } from './extension/search'
import type { KindSearch } from './kind-search'
import { TORSION_SEARCH } from './torsion/search'

const SEARCHES: { readonly [K in SpringKind]: KindSearch<K> } = {
  compression: COMPRESSION_SEARCH, extension: EXTENSION_SEARCH, torsion: TORSION_SEARCH,
}

/** How springs of a kind are searched. */
export function searchOf<K extends SpringKind>(kind: K): KindSearch<K> {
  return SEARCHES[kind]
}
