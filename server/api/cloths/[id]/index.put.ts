import { updateCloth } from '../../../services/cloths'
import { handle } from '../../../utils/handle'

export default handle('cloths.update', ({ room, id, body }) => updateCloth(room, id, body))
