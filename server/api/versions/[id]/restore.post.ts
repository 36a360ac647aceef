import { restoreVersion } from '../../../services/versions'
import { handle } from '../../../utils/handle'

export default handle('versions.restore', ({ room, id, body }) => restoreVersion(room, id, body))
