import { getWorkingCopy } from '../../../services/working-copy'
import { handle } from '../../../utils/handle'

export default handle('garments.workingCopy', ({ room, id }) => getWorkingCopy(room, id))
