import { whatIfOf } from '../../services/solve'
import { handle } from '../../utils/handle'

export default handle('solve.whatIf', ({ body }) => whatIfOf(body))
