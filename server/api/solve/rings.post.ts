import { ringsOf } from '../../services/solve'
import { handle } from '../../utils/handle'

export default handle('solve.rings', ({ body }) => ringsOf(body))
