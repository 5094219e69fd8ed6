import { execFileSync } from 'node:child_process'
import { fileURLToPath } from 'node:url'

/** A wire as the Python model takes it: its data travel along, its formulas do not. */
export interface ModelWire {
  readonly id: string
  readonly family: string
  readonly diameter: number
  readonly greatestDiameter: number
  readonly strength: number
  readonly shearModulus: number
  readonly youngsModulus: number
  readonly density: number
}

/** What differential evolution found, g and seconds; null mass where it found none. */
export interface ModelAnswer {
  readonly mass: number | null
  readonly seconds: number
  readonly evaluations: number
  /** The model's own mass of the design that went with the request, g, and the greatest share by which it misses a requirement. */
  readonly judged: { readonly mass: number, readonly worstMiss: number } | null
}

/** Debian's own, which has Debian's package python3-scipy; another in the path may not. */
const DEBIAN_PYTHON = '/usr/bin/python3'
const SEARCH = fileURLToPath(new URL('./search.py', import.meta.url))

/** Sizes by SciPy's differential evolution in the model written anew in Python. Throws with Python's words where it cannot. */
export function sizeWithScipy(requests: readonly object[]): readonly ModelAnswer[] {
  const output = execFileSync(DEBIAN_PYTHON, [SEARCH], { input: JSON.stringify({ requests }), encoding: 'utf8', env: { ...process.env, PYTHONDONTWRITEBYTECODE: '1' }, maxBuffer: 1 << 26 })
  return (JSON.parse(output) as { answers: ModelAnswer[] }).answers
}
