import { removePrinter } from '../../services/printers'
import { handle } from '../../utils/handle'

export default handle('printers.remove', ({ room, id }) => removePrinter(room, id))
