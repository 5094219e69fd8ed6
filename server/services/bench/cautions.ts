import type { OperationKind } from '#shared/schemas/shop'

const CAUTIONS: Readonly<Record<OperationKind, readonly string[]>> = {
  'coiling': ['Wear eye protection. The end of the wire whips when the coil runs out.', 'Never reach into a running coiler. Cut bands of coil stock with care: it springs out.'],
  'stress-relief': ['The oven and the load are hot: gloves, and let them cool.', 'Drawing lubricant burns off: run the ventilation.'],
  'end-grinding': ['Wear eye protection. Keep extraction running: dust, sparks and oil mist.', 'Hold springs as the fixture asks; a loose one is thrown.'],
  'inspection': ['A pressed spring stores energy: eye protection and a guard when loading.', 'Stop and tell the supervisor if a spring breaks or takes a set.'],
  'packing': ['Springs under tension or tangled springs can jump: eye protection.', 'Lift with care; follow the shop’s own rules for heavy boxes.'],
}

/** The usual cautions at a work centre, common practice; the shop's own rules come first. */
export const cautionsFor = (kind: OperationKind): string[] => [...CAUTIONS[kind], 'The rules of this shop and of qualified people come first.']
