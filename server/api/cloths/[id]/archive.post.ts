import { archiveCloth } from '../../../services/cloths'
import { handle } from '../../../utils/handle'

export default handle('cloths.archive', ({ room, id }) => archiveCloth(room, id, true))
