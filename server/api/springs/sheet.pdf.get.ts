import { SpringSheetQuerySchema } from '#shared/schemas/spring/sheet'
import { printSpringSheet } from '../../services/springs/sheet-pdf'

/** The data sheet of the spring in the query, as a PDF that opens in the browser. */
export default defineRoute({ access: 'public', query: SpringSheetQuerySchema, limit: { name: 'springs-sheet', max: 30, windowS: 60 } }, async ({ event, context, query }) => {
  const { pdf, fileName } = await printSpringSheet(context, query, await useSheetFonts())
  setResponseHeaders(event, { 'content-type': 'application/pdf', 'content-disposition': `inline; filename="${fileName}"`, 'content-length': pdf.length })
  return pdf
})
