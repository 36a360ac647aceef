import { removeTest } from '../../../services/cloths'
import { handle } from '../../../utils/handle'

export default handle('tests.archive', ({ room, id }) => removeTest(room, id))
