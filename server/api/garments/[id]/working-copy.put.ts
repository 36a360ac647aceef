import { saveWorkingCopy } from '../../../services/working-copy'
import { handle } from '../../../utils/handle'

export default handle('garments.saveWorkingCopy', ({ room, id, body }) => saveWorkingCopy(room, id, body))
