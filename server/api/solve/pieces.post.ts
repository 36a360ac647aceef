import { piecesOf } from '../../services/solve'
import { handle } from '../../utils/handle'

export default handle('solve.pieces', ({ body }) => piecesOf(body))
