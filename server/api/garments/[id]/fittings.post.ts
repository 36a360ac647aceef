import { recordFitting } from '../../../services/fittings'
import { handle } from '../../../utils/handle'

export default handle('fittings.create', ({ room, id, body }) => recordFitting(room, id, body))
