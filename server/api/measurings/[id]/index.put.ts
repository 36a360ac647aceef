import { updateMeasuring } from '../../../services/measurings'
import { handle } from '../../../utils/handle'

export default handle('measurings.update', ({ room, id, body }) => updateMeasuring(room, id, body))
