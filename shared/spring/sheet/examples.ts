import type { SpringKind } from '../codes'

/** An example of each kind to begin from, as an address holds it. */
export const EXAMPLE_ADDRESSES: Readonly<Record<SpringKind, Readonly<Record<string, string>>>> = {
  compression: {
    kind: 'compression', material: 'EN10270-1-SH', d: '2.5mm', D: '20mm', n: '8.25', nt: '10.25', L0: '60mm', p1: 'L50mm', p2: 'L35mm', ends: 'closed-ground', hand: 'right', bore: '24mm', rod: '14mm',
    cycles: '200000', strokes: '30',
  },
  extension: {
    kind: 'extension', material: 'EN10270-1-SH', d: '1.6mm', D: '12mm', nb: '20', F0: '12N', hook: 'full-loop', p1: 'L60mm', p2: 'L80mm', hand: 'right', cycles: '10000',
  },
  torsion: {
    kind: 'torsion', material: 'EN10270-1-SH', d: '2mm', D: '16mm', nb: '5.25', leg1: '30mm', leg1form: 'tangential', leg2: '30mm', leg2form: 'tangential', p1: 'a30deg', p2: 'a90deg', hand: 'right', rod: '10mm',
  },
}
