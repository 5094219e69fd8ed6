/** The rules that forms of ours name. What a request must look like is said by its Zod schema, not by these. */
export { email, length, max, min, number, required } from '@formkit/rules'
