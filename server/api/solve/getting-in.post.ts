import { gettingInOf } from '../../services/solve'
import { handle } from '../../utils/handle'

export default handle('solve.gettingIn', ({ body }) => gettingInOf(body))
