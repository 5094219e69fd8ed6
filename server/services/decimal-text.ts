/** Decimal text as a person writes it, without the idle zeros that PostgreSQL's numeric adds: 20.000 is 20, 2.450 is 2.45. */
export const trimDecimals = (text: string): string => text.includes('.') ? text.replace(/\.?0+$/, '') : text
