import { listGarments } from '../../services/garments'
import { handle } from '../../utils/handle'

export default handle('garments.list', ({ room, query }) => listGarments(room, query))
