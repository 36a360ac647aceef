import { getWearer } from '../../../services/wearers'
import { handle } from '../../../utils/handle'

export default handle('wearers.get', ({ room, id }) => getWearer(room, id))
