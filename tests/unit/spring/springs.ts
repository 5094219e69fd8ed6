import type { CompressionInput, CompressionSizeRequest, MaterialCode, SizingWire } from '#shared/spring'
import { standardDiametersMm } from '#shared/spring'

/** A spring that passes every check: music-grade EN wire 2 mm on 16 mm, 8 coils, 60 mm free. */
export function makeSpring(overrides: Partial<CompressionInput> = {}): CompressionInput {
  return {
    kind: 'compression',
    material: 'EN10270-1-SH',
    wireDiameterMm: 2,
    meanDiameterMm: 16,
    activeCoils: 8,
    freeLengthMm: 60,
    ends: 'closed-ground',
    points: [{ lengthMm: 50 }, { lengthMm: 40 }],
    ...overrides,
  }
}

/** 50 N at 40 mm and 100 N at 30 mm: rate 5 N/mm, free length 50 mm. */
export function makeRequest(overrides: Partial<CompressionSizeRequest> = {}): CompressionSizeRequest {
  return { kind: 'compression', points: [{ lengthMm: 40, forceN: 50 }, { lengthMm: 30, forceN: 100 }], ...overrides }
}

/** Every diameter sold of the materials, as wires of a catalogue. */
export function makeWires(...codes: MaterialCode[]): SizingWire[] {
  return codes.flatMap(material => standardDiametersMm(material).map(d => ({ id: `${material} ${d}`, material, wireDiameterMm: d })))
}

export const EN_CODES: MaterialCode[] = ['EN10270-1-SL', 'EN10270-1-SM', 'EN10270-1-SH', 'EN10270-2-FDSiCr', 'EN10270-3-1.4310']
