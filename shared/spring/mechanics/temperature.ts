/** A modulus at a temperature, MPa: G20 (1 - r (t - 20)); E the same (EN 13906-1, from memory). */
export function modulusAtTemperatureMpa(modulusAt20Mpa: number, lossPerKelvin: number, temperatureC: number): number {
  return modulusAt20Mpa * (1 - lossPerKelvin * (temperatureC - 20))
}
