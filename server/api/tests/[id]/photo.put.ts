import { redraw } from '../../../files/picture'
import { attachPhoto, pictureOf } from '../../../services/test-photos'
import { files } from '../../../utils/files'
import { handleUpload } from '../../../utils/handle'

export default handleUpload(
  'tests.attachPhoto',
  async (path) => pictureOf(await redraw(path)),
  ({ room, id }, picture) => attachPhoto(room, files(), id, picture),
)
