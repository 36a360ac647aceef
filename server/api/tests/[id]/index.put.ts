import { updateTest } from '../../../services/cloths'
import { handle } from '../../../utils/handle'

export default handle('tests.update', ({ room, id, body }) => updateTest(room, id, body))
