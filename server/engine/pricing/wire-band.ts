/** Bands the coiling and grinding rates are kept in. Common trade practice, no published source. */
export type WireBand = 'fine' | 'light' | 'medium' | 'heavy'

/** Band of a wire: fine to 0.5 mm, light to 2 mm, medium to 6 mm, heavy above. */
export function wireBandOf(wireDiameterMm: number): WireBand {
  if (wireDiameterMm <= 0.5) return 'fine'
  if (wireDiameterMm <= 2) return 'light'
  if (wireDiameterMm <= 6) return 'medium'
  return 'heavy'
}
