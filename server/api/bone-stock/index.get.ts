import { listBoneStock } from '../../services/bone-stock'
import { handle } from '../../utils/handle'

export default handle('stock.list', ({ room }) => listBoneStock(room))
