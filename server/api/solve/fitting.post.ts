import { fittingOf } from '../../services/solve'
import { handle } from '../../utils/handle'

export default handle('solve.fitting', ({ body }) => fittingOf(body))
