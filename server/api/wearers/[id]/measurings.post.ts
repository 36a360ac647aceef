import { createMeasuring } from '../../../services/measurings'
import { handle } from '../../../utils/handle'

export default handle('measurings.create', ({ room, id, body }) => createMeasuring(room, id, body))
