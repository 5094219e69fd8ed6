import { form, group, hidden, list } from '@formkit/inputs'

export { createLibraryPlugin, createSection, localize, resetCounts, runtimeProps, useSchema } from '@formkit/inputs'
/** The inputs of FormKit that we keep; the controls themselves are ours (formkit.config.ts). */
export const inputs = { form, group, hidden, list }
