import { getMeasuring } from '../../../services/measurings'
import { handle } from '../../../utils/handle'

export default handle('measurings.get', ({ room, id }) => getMeasuring(room, id))
