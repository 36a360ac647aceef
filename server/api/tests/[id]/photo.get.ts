import { setResponseHeaders } from 'h3'
import { readPhoto } from '../../../services/test-photos'
import { files } from '../../../utils/files'
import { handle } from '../../../utils/handle'

export default handle('tests.photo', async ({ event, room, id }) => {
  const bytes = await readPhoto(room, files(), id)
  setResponseHeaders(event, { 'content-type': 'image/webp', 'content-disposition': 'inline; filename="strip.webp"' })
  return bytes
})
