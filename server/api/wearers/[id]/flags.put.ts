import { noteFlags } from '../../../services/wearers'
import { handle } from '../../../utils/handle'

export default handle('wearers.flags', ({ room, id, body }) => noteFlags(room, id, body))
