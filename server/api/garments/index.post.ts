import { createGarment } from '../../services/garments'
import { handle } from '../../utils/handle'

export default handle('garments.create', ({ room, body }) => createGarment(room, body))
