import { getCloth } from '../../../services/cloths'
import { handle } from '../../../utils/handle'

export default handle('cloths.get', ({ room, id }) => getCloth(room, id))
