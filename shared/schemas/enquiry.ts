import { z } from 'zod'
import { COUNTRIES, countrySchema, daySchema, emailSchema, lineSchema, textSchema } from './shared-fields'
import { COMPRESSION_ENDS, HOOK_FORMS, LEG_FORMS, MATERIAL_CODES, SURROUNDINGS } from '../spring/codes'

const positive = (what: string, max: number) => z.number({ error: issue => issue.input === undefined || issue.input === null ? `Give ${what}.` : `Give ${what} as a number.` })
  .positive(`${what[0]!.toUpperCase()}${what.slice(1)} must be more than nought.`).max(max, `At most ${max}.`)
const forceN = positive('the load', 1_000_000)
const lengthMm = positive('the length', 10_000)
const rateNPerMm = positive('the rate', 1_000_000)
const momentNmm = positive('the moment', 100_000_000)
const angleDeg = positive('the angle', 36_000)
const rateNmmPerDeg = positive('the rate', 10_000_000)
const loadAtLength = z.strictObject({ forceN, lengthMm })
const momentAtAngle = z.strictObject({ momentNmm, angleDeg })

const NO_NEED = 'Choose what you know about the spring.'

/** What the customer knows about a spring that is pressed. */
export const compressionNeedSchema = z.discriminatedUnion('knows', [
  z.strictObject({ knows: z.literal('two-loads'), first: loadAtLength, second: loadAtLength }),
  z.strictObject({ knows: z.literal('load-and-rate'), load: loadAtLength, rateNPerMm }),
  z.strictObject({ knows: z.literal('rate-and-length'), rateNPerMm, freeLengthMm: lengthMm, shortestLengthMm: lengthMm }),
], NO_NEED)

/** What the customer knows about a spring that is pulled; lengths are inside the hooks. */
export const extensionNeedSchema = z.discriminatedUnion('knows', [
  z.strictObject({ knows: z.literal('two-loads'), first: loadAtLength, second: loadAtLength }),
  z.strictObject({ knows: z.literal('load-and-rate'), load: loadAtLength, rateNPerMm }),
  z.strictObject({ knows: z.literal('load-and-length'), load: loadAtLength, freeLengthMm: lengthMm }),
], NO_NEED)

/** What the customer knows about a spring that is turned. Two moments: angles from any fixed place; one alone: from free. */
export const torsionNeedSchema = z.discriminatedUnion('knows', [
  z.strictObject({ knows: z.literal('two-moments'), first: momentAtAngle, second: momentAtAngle }),
  z.strictObject({ knows: z.literal('moment-and-rate'), load: momentAtAngle, rateNmmPerDeg }),
  z.strictObject({ knows: z.literal('moment-from-free'), load: momentAtAngle }),
], NO_NEED)
export type CompressionNeed = z.infer<typeof compressionNeedSchema>
export type ExtensionNeed = z.infer<typeof extensionNeedSchema>
export type TorsionNeed = z.infer<typeof torsionNeedSchema>

/** What every kind is asked beside what it must do. */
const common = {
  boreMm: positive('the bore', 10_000).optional(),
  rodMm: positive('the rod', 10_000).optional(),
  /** Compression: unloaded. Extension: inside the hooks, unloaded. Torsion: the body, at its longest. */
  maxFreeLengthMm: positive('the longest free length', 10_000).optional(),
  hand: z.enum(['either', 'left', 'right']).default('either'),
  surroundings: z.enum(SURROUNDINGS).default('dry'),
  coldestC: z.number().min(-273, 'Not below -273 °C.').max(1000, 'At most 1000 °C.').default(5),
  hottestC: z.number().min(-273, 'Not below -273 °C.').max(1000, 'At most 1000 °C.').default(40),
  strokes: z.number().int('Whole strokes.').min(1, 'At least one stroke.').max(1e12, 'At most 10^12.').default(10_000),
  strokesPerMinute: z.number().min(0, 'Not below nought.').max(100_000, 'At most 100 000.').default(0),
  couldHurt: z.enum(['no', 'yes-or-unsure'], 'Say whether a break could hurt someone.'),
  material: z.enum(['any', ...MATERIAL_CODES], 'Choose a material from the list.').default('any'),
  toleranceGrade: z.union([z.literal(1), z.literal(2), z.literal(3)], 'Choose grade 1, 2 or 3.').default(2),
  certificate: z.boolean().default(false),
  quantities: z.array(z.int('A whole number of springs.').min(1, 'At least one spring.').max(1_000_000, 'At most 1 000 000 springs.'))
    .min(1, 'Give at least one quantity.').max(6, 'At most six quantities.')
    .refine(list => new Set(list).size === list.length, 'Each quantity once.'),
  neededOn: daySchema.optional(),
}

const compressionRequirementSchema = z.strictObject({
  kind: z.literal('compression'),
  need: compressionNeedSchema,
  ...common,
  maxSolidLengthMm: positive('the shortest room', 10_000).optional(),
  ends: z.enum(COMPRESSION_ENDS, 'Choose the ends from the list.').default('closed-ground'),
})
const extensionRequirementSchema = z.strictObject({
  kind: z.literal('extension'),
  need: extensionNeedSchema,
  ...common,
  hook: z.enum(HOOK_FORMS, 'Choose the hooks from the list.').default('full-loop'),
})
const torsionRequirementSchema = z.strictObject({
  kind: z.literal('torsion'),
  need: torsionNeedSchema,
  ...common,
  /** From the coil to where the load acts; both legs are alike in form. */
  firstLegMm: positive('the length of the first leg', 1000),
  secondLegMm: positive('the length of the second leg', 1000),
  legForm: z.enum(LEG_FORMS, 'Choose the legs from the list.').default('tangential'),
  /** Whether the load winds the coil up, as it should, or opens it. */
  load: z.enum(['winds-up', 'opens'], 'Say which way it is turned.').default('winds-up'),
})
export type CompressionRequirement = z.infer<typeof compressionRequirementSchema>
export type ExtensionRequirement = z.infer<typeof extensionRequirementSchema>
export type TorsionRequirement = z.infer<typeof torsionRequirementSchema>

type Issue = (path: (string | number)[], message: string) => void

function checkCompression(value: CompressionRequirement, issue: Issue): void {
  const { need } = value
  if (need.knows === 'two-loads') {
    if (need.first.lengthMm <= need.second.lengthMm) issue(['need', 'second', 'lengthMm'], 'The second length must be shorter than the first: the spring is pressed further.')
    if (need.first.forceN >= need.second.forceN) issue(['need', 'second', 'forceN'], 'The second load must be higher than the first: a shorter spring pushes harder.')
  }
  if (need.knows === 'rate-and-length' && need.shortestLengthMm >= need.freeLengthMm)
    issue(['need', 'shortestLengthMm'], 'The shortest working length must be shorter than the free length.')
  if (need.knows === 'rate-and-length' && value.maxFreeLengthMm !== undefined && need.freeLengthMm > value.maxFreeLengthMm)
    issue(['need', 'freeLengthMm'], 'The free length is beyond the longest it may be.')
  const longest = need.knows === 'two-loads' ? need.first.lengthMm : need.knows === 'load-and-rate' ? need.load.lengthMm : 0
  if (value.maxFreeLengthMm !== undefined && longest >= value.maxFreeLengthMm)
    issue(['maxFreeLengthMm'], 'A spring under load is shorter than when free: the longest free length must be more than the length under the first load.')
}

function checkExtension({ need, maxFreeLengthMm }: ExtensionRequirement, issue: Issue): void {
  if (need.knows === 'two-loads') {
    if (need.first.lengthMm >= need.second.lengthMm) issue(['need', 'second', 'lengthMm'], 'The second length must be longer than the first: the spring is pulled further.')
    if (need.first.forceN >= need.second.forceN) issue(['need', 'second', 'forceN'], 'The second load must be higher than the first: a longer spring pulls harder.')
  }
  if (need.knows === 'load-and-length') {
    if (need.load.lengthMm <= need.freeLengthMm) issue(['need', 'load', 'lengthMm'], 'The length under load must be longer than the free length.')
    if (maxFreeLengthMm !== undefined && need.freeLengthMm > maxFreeLengthMm) issue(['need', 'freeLengthMm'], 'The free length is beyond the longest it may be.')
  }
}

function checkTorsion({ need }: TorsionRequirement, issue: Issue): void {
  if (need.knows !== 'two-moments') return
  if (need.first.angleDeg >= need.second.angleDeg) issue(['need', 'second', 'angleDeg'], 'The second angle must be greater than the first: the spring is turned further.')
  if (need.first.momentNmm >= need.second.momentNmm) issue(['need', 'second', 'momentNmm'], 'The second moment must be higher than the first: turned further, it turns back harder.')
}

/** The spring a customer asks for, in SI; everything but who asks. */
export const requirementSchema = z.discriminatedUnion('kind', [compressionRequirementSchema, extensionRequirementSchema, torsionRequirementSchema], 'Say whether the spring pushes, pulls or twists.')
  .superRefine((value, context) => {
    const issue: Issue = (path, message) => context.addIssue({ code: 'custom', path, message })
    if (value.boreMm !== undefined && value.rodMm !== undefined && value.boreMm <= value.rodMm) issue(['boreMm'], 'The bore must be wider than the rod.')
    if (value.coldestC > value.hottestC) issue(['hottestC'], 'The hottest must not be below the coldest.')
    if (value.kind === 'compression') checkCompression(value, issue)
    else if (value.kind === 'extension') checkExtension(value, issue)
    else checkTorsion(value, issue)
  })
export type Requirement = z.infer<typeof requirementSchema>
export type RequirementInput = z.input<typeof requirementSchema>

export const contactSchema = z.strictObject({
  name: lineSchema('your name', 120),
  firm: lineSchema('your firm', 160),
  email: emailSchema,
  countryCode: countrySchema,
  vatNumber: z.string().trim().toUpperCase().regex(/^[A-Z]{2}[A-Z0-9+*]{2,12}$/, 'A VAT number starts with the country, such as IE1234567A.').optional(),
  title: lineSchema('what the spring is for', 120),
  remarks: textSchema(4000).default(''),
}).superRefine(({ vatNumber, countryCode }, context) => {
  // The tax depends on both, so they must agree. XI is Northern Ireland.
  const agrees = vatNumber === undefined || vatNumber.startsWith(countryCode) || (countryCode === 'GB' && vatNumber.startsWith('XI'))
  if (!agrees) context.addIssue({ code: 'custom', path: ['vatNumber'], message: `A VAT number of ${COUNTRIES[countryCode]} starts with ${countryCode}. Leave it out, or change the country.` })
})
export type Contact = z.infer<typeof contactSchema>

/** The whole order form. `website` is a field that people do not see; only robots fill it in. */
export const enquiryRequestSchema = z.strictObject({
  requirement: requirementSchema,
  contact: contactSchema,
  units: z.enum(['metric', 'inch']).default('metric'),
  website: z.string().max(0, 'Leave this empty.').default(''),
})
export type EnquiryRequest = z.infer<typeof enquiryRequestSchema>
export type EnquiryInput = z.input<typeof enquiryRequestSchema>

/** Price as one types: the requirement, and where it would be sent. */
export const previewBodySchema = z.strictObject({ requirement: requirementSchema, countryCode: countrySchema.default('IE') })
