import { setResponseHeaders } from 'h3'
import { loadPrintFonts } from '../../../print/fonts'
import { renderPatternPdf } from '../../../print/pattern-pdf'
import { printOfVersion } from '../../../services/print'
import { handle } from '../../../utils/handle'

export default handle('print.pattern', async ({ event, room, who, id, query }) => {
  const { set, title } = await printOfVersion(room, id, query, who.unit)
  const fonts = await loadPrintFonts()
  const file = `${title.replace(/[^\w.-]+/g, '-')}.pdf`
  setResponseHeaders(event, { 'content-type': 'application/pdf', 'content-disposition': `inline; filename="${file}"` })
  // The date that stands on the print, not the hour: a print of the same day is the same file.
  return renderPatternPdf({ set, title, createdAt: new Date(`${room.today}T00:00:00Z`) }, fonts)
})
