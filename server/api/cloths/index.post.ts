import { createCloth } from '../../services/cloths'
import { handle } from '../../utils/handle'

export default handle('cloths.create', ({ room, body }) => createCloth(room, body))
