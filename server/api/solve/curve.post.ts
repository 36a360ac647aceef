import { curveOfTest } from '../../services/solve'
import { handle } from '../../utils/handle'

export default handle('solve.curve', ({ body }) => curveOfTest(body))
