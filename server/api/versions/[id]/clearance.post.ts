import { clearVersion } from '../../../services/versions'
import { handle } from '../../../utils/handle'

export default handle('versions.clear', ({ room, id, body }) => clearVersion(room, id, body))
