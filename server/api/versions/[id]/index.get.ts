import { getVersion } from '../../../services/versions'
import { handle } from '../../../utils/handle'

export default handle('versions.get', ({ room, id }) => getVersion(room, id))
