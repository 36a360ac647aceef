import { updateWorkroom } from '../../services/workroom'
import { handle } from '../../utils/handle'

export default handle('workroom.update', ({ room, body }) => updateWorkroom(room, body))
