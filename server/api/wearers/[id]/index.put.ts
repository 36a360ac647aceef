import { updateWearer } from '../../../services/wearers'
import { handle } from '../../../utils/handle'

export default handle('wearers.update', ({ room, id, body }) => updateWearer(room, id, body))
