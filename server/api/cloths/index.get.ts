import { listCloths } from '../../services/cloths'
import { handle } from '../../utils/handle'

export default handle('cloths.list', ({ room, query }) => listCloths(room, query))
