import { createTest } from '../../../services/cloths'
import { handle } from '../../../utils/handle'

export default handle('tests.create', ({ room, id, body }) => createTest(room, id, body))
