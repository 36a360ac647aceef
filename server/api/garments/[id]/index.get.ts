import { getGarment } from '../../../services/garments'
import { handle } from '../../../utils/handle'

export default handle('garments.get', ({ room, id }) => getGarment(room, id))
