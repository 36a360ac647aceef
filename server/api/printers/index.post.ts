import { measurePrinter } from '../../services/printers'
import { handle } from '../../utils/handle'

export default handle('printers.measure', ({ room, body }) => measurePrinter(room, body))
