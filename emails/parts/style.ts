/** The tokens of the design that e-mails use, written out: a mail has no style sheet. */
export const ink = '#16191F'
export const graphite = '#474E58'
export const paper = '#F1F3EF'
export const sheet = '#FDFDFB'
export const rule = '#C9CDC8'
export const blueSteel = '#1D4A76'
const family = `font-family: 'Work Sans', Helvetica, Arial, sans-serif`

export const textStyle = `margin: 0 0 16px; ${family}; font-size: 16px; line-height: 24px; color: ${ink}`
export const smallStyle = `margin: 0 0 8px; ${family}; font-size: 14px; line-height: 20px; color: ${graphite}`
export const headingStyle = `margin: 0 0 16px; ${family}; font-size: 25px; line-height: 32px; font-weight: 600; color: ${ink}`
export const cellStyle = `padding: 8px 16px 8px 0; border-top: 1px solid ${rule}; ${family}; font-size: 16px; line-height: 24px; color: ${ink}; vertical-align: top`
