import { setResponseHeaders } from 'h3'
import { bundleFile } from '../../../services/bundle-out'
import { handle } from '../../../utils/handle'

export default handle('print.bundle', async ({ event, room, who, id, query }) => {
  const { bytes, file } = await bundleFile(room, id, query.body === '1', who.unit)
  setResponseHeaders(event, { 'content-type': 'application/zip', 'content-disposition': `attachment; filename="${file}"` })
  return Buffer.from(bytes)
})
