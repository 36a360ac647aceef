import { readBundleFile } from '../../files/bundle-file'
import { bundleFrom, importBundle } from '../../services/bundle-in'
import { handleUpload } from '../../utils/handle'

export default handleUpload(
  'garments.import',
  async (path) => bundleFrom(await readBundleFile(path)),
  ({ room, query }, data) => importBundle(room, query.wearerId, data),
)
