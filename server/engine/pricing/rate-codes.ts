import type { RateGroup } from '#shared/rate-groups'

/** How a rate's value is read. Every value is decimal text. */
export type RateUnit =
  | 'per hour' | 'hours' | 'minutes' | 'seconds' | 'metres per minute' | 'pieces per minute' | 'pieces per hour' | 'pieces' | 'metres'
  | 'kilograms' | 'percent' | 'factor' | 'currency' | 'per kg' | 'days' | 'millimetres' | 'degrees Celsius' | 'joules' | 'number' | 'yes is 1'

export type { RateGroup }

/**
 * `shop-practice`: a starting value the reference on shop practice marks as from memory of common trade practice; no published source.
 * `practice`: common practice, no source. `policy`: the owner's own choice.
 */
export type RateOrigin = 'shop-practice' | 'practice' | 'policy'

interface RateDefinition {
  code: string
  label: string
  unit: RateUnit
  group: RateGroup
  defaultValue: string
  origin: RateOrigin
}

const row = <Code extends string>(
  code: Code, label: string, unit: RateUnit, group: RateGroup, defaultValue: string, origin: RateOrigin,
) => ({ code, label, unit, group, defaultValue, origin }) satisfies RateDefinition

/**
 * Every rate of a price book. The database keeps one row for each code; a book lacking one is refused when it is used.
 * Wire bands: fine to 0.5 mm, light to 2 mm, medium to 6 mm, heavy above. Defaults are starting points for the shop to change.
 */
export const RATE_CODES = [
  row('hourly.coiling', 'Coiling, one hour', 'per hour', 'hourly', '54.00', 'practice'),
  row('hourly.stress-relief', 'Stress relief, one hour of the oven', 'per hour', 'hourly', '22.00', 'practice'),
  row('hourly.end-grinding', 'End grinding, one hour', 'per hour', 'hourly', '46.00', 'practice'),
  row('hourly.inspection', 'Inspection, one hour', 'per hour', 'hourly', '42.00', 'practice'),
  row('hourly.packing', 'Packing, one hour', 'per hour', 'hourly', '34.00', 'practice'),

  row('coiling.setup-hours.fine', 'Coiler set-up, wire to 0.5 mm', 'hours', 'coiling', '1.00', 'shop-practice'),
  row('coiling.setup-hours.light', 'Coiler set-up, wire to 2 mm', 'hours', 'coiling', '1.25', 'shop-practice'),
  row('coiling.setup-hours.medium', 'Coiler set-up, wire to 6 mm', 'hours', 'coiling', '1.50', 'shop-practice'),
  row('coiling.setup-hours.heavy', 'Coiler set-up, wire over 6 mm', 'hours', 'coiling', '2.00', 'shop-practice'),
  row('coiling.setup-factor.grade-1', 'Coiler set-up, tolerance grade 1', 'factor', 'coiling', '1.50', 'practice'),
  row('coiling.setup-factor.grade-2', 'Coiler set-up, tolerance grade 2', 'factor', 'coiling', '1.00', 'practice'),
  row('coiling.setup-factor.grade-3', 'Coiler set-up, tolerance grade 3', 'factor', 'coiling', '0.85', 'practice'),
  row('coiling.setup-factor.extension', 'Coiler set-up, springs with hooks', 'factor', 'coiling', '2.00', 'shop-practice'),
  row('coiling.setup-factor.torsion', 'Coiler set-up, springs with legs', 'factor', 'coiling', '2.00', 'shop-practice'),
  row('coiling.setup-factor.full-loop', 'Coiler set-up, full loops', 'factor', 'coiling', '1.00', 'practice'),
  row('coiling.setup-factor.half-loop', 'Coiler set-up, half loops', 'factor', 'coiling', '1.05', 'practice'),
  row('coiling.setup-factor.crossover-loop', 'Coiler set-up, loops crossed to the middle', 'factor', 'coiling', '1.10', 'practice'),
  row('coiling.setup-factor.extended-hook', 'Coiler set-up, loops on a straight shank', 'factor', 'coiling', '1.25', 'practice'),
  row('coiling.setup-factor.tangential', 'Coiler set-up, legs off the coil', 'factor', 'coiling', '1.00', 'practice'),
  row('coiling.setup-factor.straight', 'Coiler set-up, legs along the axis', 'factor', 'coiling', '1.15', 'practice'),
  row('coiling.feed.fine', 'Wire feed, wire to 0.5 mm', 'metres per minute', 'coiling', '60', 'shop-practice'),
  row('coiling.feed.light', 'Wire feed, wire to 2 mm', 'metres per minute', 'coiling', '40', 'shop-practice'),
  row('coiling.feed.medium', 'Wire feed, wire to 6 mm', 'metres per minute', 'coiling', '18', 'shop-practice'),
  row('coiling.feed.heavy', 'Wire feed, wire over 6 mm', 'metres per minute', 'coiling', '8', 'shop-practice'),
  row('coiling.forming-seconds.fine', 'Cut-off and forming, wire to 0.5 mm', 'seconds', 'coiling', '0.15', 'practice'),
  row('coiling.forming-seconds.light', 'Cut-off and forming, wire to 2 mm', 'seconds', 'coiling', '0.30', 'practice'),
  row('coiling.forming-seconds.medium', 'Cut-off and forming, wire to 6 mm', 'seconds', 'coiling', '0.80', 'practice'),
  row('coiling.forming-seconds.heavy', 'Cut-off and forming, wire over 6 mm', 'seconds', 'coiling', '1.50', 'practice'),
  // With these a spring with hooks or legs comes off at about a third of the pace of a plain one, as shop practice has it.
  row('coiling.end-seconds.fine', 'Forming one hook or leg, wire to 0.5 mm', 'seconds', 'coiling', '0.40', 'practice'),
  row('coiling.end-seconds.light', 'Forming one hook or leg, wire to 2 mm', 'seconds', 'coiling', '0.80', 'practice'),
  row('coiling.end-seconds.medium', 'Forming one hook or leg, wire to 6 mm', 'seconds', 'coiling', '2.50', 'practice'),
  row('coiling.end-seconds.heavy', 'Forming one hook or leg, wire over 6 mm', 'seconds', 'coiling', '6.00', 'practice'),
  row('coiling.end-factor.full-loop', 'Time of one end, full loop', 'factor', 'coiling', '1.00', 'practice'),
  row('coiling.end-factor.half-loop', 'Time of one end, half loop', 'factor', 'coiling', '0.80', 'practice'),
  row('coiling.end-factor.crossover-loop', 'Time of one end, loop crossed to the middle', 'factor', 'coiling', '1.15', 'practice'),
  row('coiling.end-factor.extended-hook', 'Time of one end, loop on a straight shank', 'factor', 'coiling', '1.40', 'practice'),
  row('coiling.end-factor.tangential', 'Time of one end, leg off the coil', 'factor', 'coiling', '0.80', 'practice'),
  row('coiling.end-factor.straight', 'Time of one end, leg along the axis', 'factor', 'coiling', '1.00', 'practice'),
  row('coiling.index-easy', 'Least index that coils at full feed', 'number', 'coiling', '6', 'shop-practice'),
  row('coiling.index-slowing-percent', 'Slower feed for each unit of index below that', 'percent', 'coiling', '8', 'practice'),
  row('coiling.cap.fine', 'Most springs a minute, wire to 0.5 mm', 'pieces per minute', 'coiling', '200', 'shop-practice'),
  row('coiling.cap.light', 'Most springs a minute, wire to 2 mm', 'pieces per minute', 'coiling', '100', 'shop-practice'),
  row('coiling.cap.medium', 'Most springs a minute, wire to 6 mm', 'pieces per minute', 'coiling', '60', 'practice'),
  row('coiling.cap.heavy', 'Most springs a minute, wire over 6 mm', 'pieces per minute', 'coiling', '30', 'shop-practice'),
  row('coiling.efficiency-percent', 'Part of the coiling hour that makes springs', 'percent', 'coiling', '80', 'shop-practice'),

  row('wire.setup-scrap-pieces', 'Springs scrapped in set-up', 'pieces', 'wire', '20', 'shop-practice'),
  row('wire.setup-scrap-metres', 'Wire scrapped in set-up, at least', 'metres', 'wire', '8', 'shop-practice'),
  row('wire.running-scrap-percent', 'Scrap while running', 'percent', 'wire', '2', 'shop-practice'),
  row('wire.coil-end-metres', 'Coil end and threading, each coil', 'metres', 'wire', '3', 'shop-practice'),

  row('furnace.batch-kg', 'Springs in one oven batch', 'kilograms', 'furnace', '80', 'practice'),
  row('furnace.handling-minutes', 'Loading, heating up and unloading, each batch', 'minutes', 'furnace', '45', 'practice'),

  row('grinding.setup-hours', 'Grinder set-up', 'hours', 'grinding', '0.50', 'practice'),
  row('grinding.pieces-per-hour.fine', 'Springs ground in an hour, wire to 0.5 mm', 'pieces per hour', 'grinding', '2500', 'shop-practice'),
  row('grinding.pieces-per-hour.light', 'Springs ground in an hour, wire to 2 mm', 'pieces per hour', 'grinding', '1500', 'shop-practice'),
  row('grinding.pieces-per-hour.medium', 'Springs ground in an hour, wire to 6 mm', 'pieces per hour', 'grinding', '900', 'shop-practice'),
  row('grinding.pieces-per-hour.heavy', 'Springs ground in an hour, wire over 6 mm', 'pieces per hour', 'grinding', '200', 'shop-practice'),

  row('inspection.first-off-minutes', 'First-off, each job', 'minutes', 'inspection', '15', 'practice'),
  row('inspection.minutes-per-measurement', 'One measurement', 'minutes', 'inspection', '0.30', 'practice'),
  row('inspection.measurements-per-spring', 'Measurements on each sampled spring, compression', 'number', 'inspection', '3', 'practice'),
  row('inspection.measurements-per-spring.extension', 'Measurements on each sampled spring, with hooks', 'number', 'inspection', '5', 'practice'),
  row('inspection.measurements-per-spring.torsion', 'Measurements on each sampled spring, with legs', 'number', 'inspection', '4', 'practice'),
  row('inspection.aql', 'Acceptance quality limit of the sample: 0.65, 1.0, 1.5, 2.5, 4.0 or 6.5', 'percent', 'inspection', '1.0', 'policy'),
  row('certificate.2.1', 'Statement of compliance 2.1', 'currency', 'inspection', '6.00', 'practice'),
  row('certificate.2.2', 'Test report 2.2', 'currency', 'inspection', '12.00', 'practice'),
  row('certificate.3.1', 'Inspection certificate 3.1', 'currency', 'inspection', '18.00', 'practice'),

  row('packing.per-order', 'Packing and dispatch, each order', 'currency', 'packing', '12.50', 'practice'),
  row('packing.per-kg', 'Packing and dispatch, each kg', 'per kg', 'packing', '0.60', 'practice'),
  row('packing.minutes-per-order', 'Packing time planned, each order', 'minutes', 'packing', '15', 'practice'),
  row('packing.minutes-per-kg', 'Packing time planned, each kg', 'minutes', 'packing', '0.50', 'practice'),

  row('policy.overhead-percent', 'Overhead, of cost', 'percent', 'policy', '12', 'policy'),
  row('policy.risk-percent', 'Risk, of cost', 'percent', 'policy', '4', 'policy'),
  row('policy.margin-percent', 'Margin, of price', 'percent', 'policy', '24', 'policy'),
  row('policy.margin-floor-percent', 'Margin floor, of price', 'percent', 'policy', '15', 'policy'),
  row('policy.deposit-percent', 'Deposit, of the price with tax', 'percent', 'policy', '40', 'policy'),
  row('policy.minimum-order', 'Smallest order before tax', 'currency', 'policy', '60.00', 'policy'),
  row('policy.quote-validity-days', 'A quote stands for', 'days', 'policy', '30', 'policy'),
  row('policy.deposit-hold-days', 'Promised dates wait for the deposit', 'days', 'policy', '3', 'policy'),

  row('tax.domestic-percent', 'Tax, sold at home and to private persons in the EU', 'percent', 'tax', '20', 'policy'),
  row('tax.eu-business-percent', 'Tax, EU business elsewhere (reverse charge)', 'percent', 'tax', '0', 'policy'),
  row('tax.export-percent', 'Tax, outside the EU', 'percent', 'tax', '0', 'policy'),

  row('promise.buffer-days', 'Working days kept in hand before a promised date', 'days', 'promise', '1', 'policy'),

  row('gate.index-min', 'Least index quoted at once', 'number', 'gate', '5', 'practice'),
  row('gate.index-max', 'Greatest index quoted at once', 'number', 'gate', '12', 'shop-practice'),
  row('gate.wire-min-mm', 'Thinnest wire quoted at once', 'millimetres', 'gate', '0.3', 'practice'),
  row('gate.wire-max-mm', 'Thickest wire quoted at once', 'millimetres', 'gate', '8', 'practice'),
  row('gate.slenderness-max', 'Greatest free length over mean diameter quoted at once', 'number', 'gate', '4', 'shop-practice'),
  row('gate.energy-max-j', 'Most energy a spring with hooks or legs holds at work, quoted at once', 'joules', 'gate', '20', 'practice'),
  row('gate.tightest-grade', 'Tightest tolerance grade quoted at once', 'number', 'gate', '2', 'practice'),
  row('gate.life-max-cycles', 'Longest life quoted at once', 'number', 'gate', '10000000', 'practice'),
  row('gate.quantity-min', 'Fewest springs quoted at once', 'pieces', 'gate', '10', 'policy'),
  row('gate.quantity-max', 'Most springs quoted at once', 'pieces', 'gate', '20000', 'policy'),
  row('gate.value-max', 'Largest order quoted at once, before tax', 'currency', 'gate', '5000.00', 'policy'),
  row('gate.temperature-min-c', 'Coldest duty quoted at once', 'degrees Celsius', 'gate', '-20', 'practice'),
  row('gate.temperature-max-c', 'Warmest duty quoted at once', 'degrees Celsius', 'gate', '80', 'practice'),
  row('gate.material.carbon-steel', 'Carbon steel wire quoted at once', 'yes is 1', 'gate', '1', 'policy'),
  row('gate.material.oil-tempered', 'Oil-tempered wire quoted at once', 'yes is 1', 'gate', '1', 'policy'),
  row('gate.material.stainless', 'Stainless wire quoted at once', 'yes is 1', 'gate', '1', 'policy'),
  row('gate.material.copper-alloy', 'Copper alloy wire quoted at once', 'yes is 1', 'gate', '0', 'policy'),
  row('gate.material.other', 'Any other wire quoted at once', 'yes is 1', 'gate', '0', 'policy'),
  row('gate.surroundings.salt', 'Salt surroundings quoted at once', 'yes is 1', 'gate', '0', 'policy'),
  row('gate.surroundings.food', 'Food surroundings quoted at once', 'yes is 1', 'gate', '0', 'policy'),
  row('gate.surroundings.chemical', 'Chemical surroundings quoted at once', 'yes is 1', 'gate', '0', 'policy'),
  // The cheapest spring lies close to the limits of stress, clearance and fit by its nature, so these cautions do not stop it.
  row('gate.caution.clearance', 'Quoted at once though close to touching coils', 'yes is 1', 'gate', '1', 'policy'),
  row('gate.caution.stress', 'Quoted at once though close to an allowed stress', 'yes is 1', 'gate', '1', 'policy'),
  row('gate.caution.hook', 'Quoted at once though close to what its hooks allow', 'yes is 1', 'gate', '1', 'policy'),
  row('gate.caution.fit', 'Quoted at once though close in bore or over rod', 'yes is 1', 'gate', '1', 'policy'),
  row('gate.caution.stock', 'Quoted at once though its wire is not stocked', 'yes is 1', 'gate', '1', 'policy'),
  row('gate.caution.other', 'Quoted at once with any other caution', 'yes is 1', 'gate', '0', 'policy'),
] as const

/** Code of a rate; the same text is the key of the database row. */
export type RateCode = (typeof RATE_CODES)[number]['code']

/** The value each rate starts with, as the first price book of a new shop. */
export function buildDefaultRates(): Record<RateCode, string> {
  return Object.fromEntries(RATE_CODES.map(({ code, defaultValue }) => [code, defaultValue])) as Record<RateCode, string>
}
