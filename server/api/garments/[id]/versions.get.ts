import { listVersions } from '../../../services/versions'
import { handle } from '../../../utils/handle'

export default handle('versions.list', ({ room, id }) => listVersions(room, id))
