import { tilesOfPieces } from '../../services/print'
import { handle } from '../../utils/handle'

export default handle('solve.tiles', ({ body }) => tilesOfPieces(body))
