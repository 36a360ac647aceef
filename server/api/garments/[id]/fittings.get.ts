import { listFittings } from '../../../services/fittings'
import { handle } from '../../../utils/handle'

export default handle('fittings.list', ({ room, id }) => listFittings(room, id))
