/** One field of a title block. `span` is the number of columns of twelve that it takes on a wide sheet (2 without it). */
export type TitleCell = { label: string, value: string, span?: 3 | 4 | 6, isBig?: boolean, to?: string }
