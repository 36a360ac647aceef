import { listMeasurings } from '../../../services/measurings'
import { handle } from '../../../utils/handle'

export default handle('measurings.list', ({ room, id }) => listMeasurings(room, id))
