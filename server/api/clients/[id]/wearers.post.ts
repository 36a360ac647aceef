import { createWearer } from '../../../services/wearers'
import { handle } from '../../../utils/handle'

export default handle('wearers.create', ({ room, id, body }) => createWearer(room, id, body))
