import { G_PER_LB, MM_PER_INCH, MPA_PER_PSI, NMM_PER_LBF_INCH, N_PER_KGF, N_PER_LBF, N_PER_MM_PER_LBF_PER_INCH, type Quantity } from './convert'

/** A unit that a person may type: SI amount in one, and for temperature the SI value at nought. */
export interface TypedUnit {
  readonly quantity: Quantity
  readonly size: number
  readonly offset?: number
}

const KELVIN_AT_0_C = 273.15
const MM_PER_FOOT = 12 * MM_PER_INCH

// 'lb' and 'oz' are both masses and, in the trade's mouth, forces: each quantity has its own list.
const NAMES: Record<Quantity, ReadonlyArray<readonly [names: string, size: number, offset?: number]>> = {
  length: [
    ['mm millimetre millimetres millimeter millimeters', 1],
    ['cm centimetre centimetres centimeter centimeters', 10],
    ['m metre metres meter meters', 1000],
    ['µm μm um micron microns', 0.001],
    ['in inch inches " \'\' ″ ”', MM_PER_INCH],
    ['thou mil mils', MM_PER_INCH / 1000],
    ['ft foot feet \' ′ ’', MM_PER_FOOT],
  ],
  force: [
    ['N newton newtons', 1],
    ['kN', 1000],
    ['mN', 0.001],
    ['daN', 10],
    ['lbf lb lbs pound pounds #', N_PER_LBF],
    ['ozf oz', N_PER_LBF / 16],
    ['kgf kp', N_PER_KGF],
    ['gf p', N_PER_KGF / 1000],
  ],
  rate: [
    ['N/mm kN/m', 1],
    ['N/cm', 0.1],
    ['N/m', 0.001],
    ['lbf/in lb/in lbs/in lbf/inch lb/inch lbf/" lb/"', N_PER_MM_PER_LBF_PER_INCH],
    ['kgf/mm kp/mm', N_PER_KGF],
    ['kgf/cm kp/cm', N_PER_KGF / 10],
  ],
  moment: [
    ['N·mm Nmm N*mm N-mm', 1],
    ['N·cm Ncm N*cm', 10],
    ['N·m Nm N*m', 1000],
    ['lbf·in lbfin lbf*in lbf-in lb·in lbin lb-in in·lbf inlbf in-lb inlb', NMM_PER_LBF_INCH],
    ['lbf·ft lbfft lb·ft lbft ft-lb ftlb', 12 * NMM_PER_LBF_INCH],
    ['ozf·in ozfin oz·in ozin oz-in in-oz', NMM_PER_LBF_INCH / 16],
    ['kgf·cm kgfcm kgcm kp·cm', 10 * N_PER_KGF],
  ],
  momentRate: [
    ['N·mm/° Nmm/° N·mm/deg Nmm/deg', 1],
    ['N·m/° Nm/° N·m/deg Nm/deg', 1000],
    ['N·mm/rad Nmm/rad', Math.PI / 180],
    ['N·m/rad Nm/rad', 1000 * Math.PI / 180],
    ['lbf·in/° lbfin/° lbf·in/deg lbfin/deg in-lb/deg lb-in/deg', NMM_PER_LBF_INCH],
    ['lbf·in/rad lbfin/rad in-lb/rad', NMM_PER_LBF_INCH * Math.PI / 180],
    ['N·mm/turn Nmm/turn N·mm/rev', 1 / 360],
    ['lbf·in/turn lbfin/turn in-lb/turn', NMM_PER_LBF_INCH / 360],
  ],
  angle: [
    ['° deg degree degrees', 1],
    ['rad radian radians', 180 / Math.PI],
    ['turn turns rev', 360],
  ],
  stress: [
    ['MPa N/mm2 N/mm²', 1],
    ['GPa', 1000],
    ['kPa', 0.001],
    ['psi lbf/in2 lbf/in²', MPA_PER_PSI],
    ['ksi', MPA_PER_PSI * 1000],
    ['kgf/mm2 kgf/mm²', N_PER_KGF],
  ],
  mass: [
    ['g gram grams', 1],
    ['kg kilo kilos', 1000],
    ['mg', 0.001],
    ['lb lbs pound pounds', G_PER_LB],
    ['oz ounce ounces', G_PER_LB / 16],
  ],
  temperature: [
    ['°C C ºC', 1],
    ['°F F ºF', 5 / 9, -160 / 9],
    ['K', 1, -KELVIN_AT_0_C],
  ],
}

/** Case tells mN from MN, so the exact spelling is tried first; 'MM' or 'LBF' are taken in any case. */
function find(name: string, quantity: Quantity): TypedUnit | undefined {
  const lower = name.toLowerCase()
  let loose: TypedUnit | undefined
  for (const [names, size, offset] of NAMES[quantity]) {
    for (const known of names.split(' ')) {
      if (known === name) return { quantity, size, offset }
      // 'MN' and 'Mg' may be meant as mega: never guess over a factor of a thousand million
      if (!loose && known.toLowerCase() === lower && !/^M[NGg]$/.test(name)) loose = { quantity, size, offset }
    }
  }
  return loose
}

/** The unit of that name for the quantity wanted, else the quantity it belongs to, else nothing. Spaces are ignored. */
export function findUnit(name: string, wanted: Quantity): TypedUnit | undefined {
  const bare = name.replace(/[\s.]+/g, '')
  const own = find(bare, wanted)
  if (own) return own
  for (const quantity of Object.keys(NAMES) as Quantity[]) {
    const other = find(bare, quantity)
    if (other) return other
  }
  return undefined
}
