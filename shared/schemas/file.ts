/** The kinds of drawing file that are taken, found from the content. */
export const FILE_KINDS = ['pdf', 'png', 'jpeg', 'dxf', 'step'] as const
export type FileKind = (typeof FILE_KINDS)[number]

/** `receiving` until all bytes are here, `received` until it was checked, then `checked` or `refused`. */
export const FILE_STATES = ['receiving', 'received', 'checked', 'refused'] as const
export type FileState = (typeof FILE_STATES)[number]
