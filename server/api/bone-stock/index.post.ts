import { keepBoneStock } from '../../services/bone-stock'
import { handle } from '../../utils/handle'

export default handle('stock.save', ({ room, body }) => keepBoneStock(room, body))
