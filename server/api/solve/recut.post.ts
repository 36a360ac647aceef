import { recutOf } from '../../services/solve'
import { handle } from '../../utils/handle'

export default handle('solve.recut', ({ body }) => recutOf(body))
