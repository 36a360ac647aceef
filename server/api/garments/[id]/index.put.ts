import { updateGarment } from '../../../services/garments'
import { handle } from '../../../utils/handle'

export default handle('garments.update', ({ room, id, body }) => updateGarment(room, id, body))
