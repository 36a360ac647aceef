import { putAwayBoneStock } from '../../services/bone-stock'
import { handle } from '../../utils/handle'

export default handle('stock.remove', ({ room, id }) => putAwayBoneStock(room, id))
