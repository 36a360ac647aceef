import { createVersion } from '../../../services/versions'
import { handle } from '../../../utils/handle'

export default handle('versions.create', ({ room, id, body }) => createVersion(room, id, body))
