import { z } from 'zod'
import { COUNTRIES } from '../countries'

const NO_DAY = 'Give a date that exists, such as 2026-12-14.'
/** A calendar day, YYYY-MM-DD, that exists, within the years a plan can hold: the database has no year 0, and no zone beyond 9999. */
export const daySchema = z.iso.date(NO_DAY).refine(day => day >= '2000-01-01' && day <= '2199-12-31', NO_DAY)

export { COUNTRIES }
export const countrySchema = z.enum(Object.keys(COUNTRIES) as [keyof typeof COUNTRIES, ...(keyof typeof COUNTRIES)[]], 'Choose a country from the list.')

/** One e-mail address, lower-cased; never a list of them. */
export const emailSchema = z.string('Give an e-mail address.').trim().toLowerCase().max(254, 'An e-mail address has at most 254 characters.')
  .regex(/^[^\s@,;<>"()[\]\\\p{Cc}]+@[^\s@,;<>"()[\]\\\p{Cc}]+\.[^\s@,;<>"()[\]\\.\p{Cc}]{2,}$/u, 'Give one e-mail address, such as name@firm.example.')

/** One line of text without control characters. */
export const lineSchema = (what: string, max: number) => z.string(`Give ${what}.`).trim().min(1, `Give ${what}.`).max(max, `At most ${max} characters.`)
  .refine(value => !/[\u0000-\u001f\u007f\u2028\u2029]/.test(value), 'One line, without control characters.')

/** Free text over several lines; control characters other than line ends and tabs are refused. */
export const textSchema = (max: number) => z.string().trim().max(max, `At most ${max} characters.`)
  .refine(value => !/[\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f]/.test(value), 'Text without control characters.')

/** A reason that a colleague can read later. */
export const reasonSchema = lineSchema('a reason', 300)

/** The number of the record that the writer saw; a stale one is refused with 412. */
export const versionSchema = z.int().min(1).max(2_147_483_647)

export const orderRefSchema = z.string().regex(/^OX-[1-9]\d{0,11}$/, 'An order number looks like OX-2417.')
export const jobRefSchema = z.string().regex(/^J-[1-9]\d{0,11}$/, 'A job number looks like J-1207.')
export const accessKeySchema = z.string().regex(/^[A-Za-z0-9_-]{22,64}$/)

/** 32 random bytes in base64url, as sent in a link. */
export const linkTokenSchema = z.string().regex(/^[A-Za-z0-9_-]{43}$/, 'This link is not whole. Open it from the e-mail again.')

/** A list is read by key: the cursor is what the last answer gave. */
export const pageQuerySchema = z.strictObject({
  cursor: z.string().max(200).optional(),
  limit: z.coerce.number().int().min(1).max(100).default(25),
})
