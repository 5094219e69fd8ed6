import type { OperationKind } from '#shared/schemas/shop'
import type { MaterialCode, SpringKind } from '#shared/spring/codes'

const CAUTIONS: Readonly<Record<OperationKind, readonly string[]>> = {
  'coiling': ['Wear eye protection. The end of the wire whips when the coil runs out.', 'Never reach into a running coiler. Cut bands of coil stock with care: it springs out.'],
  'stress-relief': ['The oven and the load are hot: gloves, and let them cool.', 'Drawing lubricant burns off: run the ventilation.'],
  'end-grinding': ['Wear eye protection. Keep extraction running: dust, sparks and oil mist.', 'Hold springs as the fixture asks; a loose one is thrown.'],
  'inspection': ['Stop and tell the supervisor if a spring breaks or takes a set.'],
  'packing': ['Springs under tension or tangled springs can jump: eye protection.', 'Lift with care; follow the shop’s own rules for heavy boxes.'],
}

/** What a kind of spring adds: hooks and legs are formed by tools that move on their own, and let go in another way. */
const OF_KIND: Readonly<Record<SpringKind, Partial<Record<OperationKind, string>>>> = {
  compression: { inspection: 'A pressed spring stores energy: eye protection and a guard when loading.' },
  extension: {
    'coiling': 'The tools that form the hooks move on their own: guards shut while they run.',
    'stress-relief': 'Heat takes initial tension away: keep to the time, and measure the first ones before the rest go in.',
    'inspection': 'A pulled spring flies when a hook slips: eye protection, a guard, and stand out of its line.',
    'packing': 'Hooks tangle: part springs by hand, never by pulling one hard.',
  },
  torsion: {
    'coiling': 'The tools that form the legs move on their own: guards shut while they run.',
    'stress-relief': 'Heat moves the angle between the legs: measure the first ones before the rest go in.',
    'inspection': 'A wound-up spring whips back when a leg slips: hold both legs in the fixture, eye protection, hands clear.',
    'packing': 'Wire ends of legs are sharp: gloves.',
  },
}

/** Beryllium harms the lungs. */
const OF_BERYLLIUM_COPPER: Partial<Record<OperationKind, string>> = {
  'coiling': 'Beryllium copper: no dry sanding or filing of ends; its dust harms the lungs.',
  'stress-relief': 'Beryllium copper shrinks and distorts as it ages: hold it on its fixture.',
  'end-grinding': 'Beryllium copper: never grind it dry; its dust harms the lungs. Wet, with extraction, by the shop’s own rules.',
}

const LAST = 'The rules of this shop and of qualified people come first.'

/** The usual cautions of operations on a spring, each once, common practice; the shop's own rules come first. */
export function cautionsFor(operations: readonly OperationKind[], spring: { kind: SpringKind, material: MaterialCode } | null): string[] {
  const lines = operations.flatMap(operation => [
    ...CAUTIONS[operation], ...(spring ? [OF_KIND[spring.kind][operation], spring.material === 'ASTM-B197' ? OF_BERYLLIUM_COPPER[operation] : undefined] : []),
  ])
  return [...new Set([...lines.filter(line => line !== undefined), LAST])]
}
