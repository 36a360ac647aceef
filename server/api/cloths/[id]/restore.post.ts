import { archiveCloth } from '../../../services/cloths'
import { handle } from '../../../utils/handle'

export default handle('cloths.restore', ({ room, id }) => archiveCloth(room, id, false))
