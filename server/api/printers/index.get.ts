import { listPrinters } from '../../services/printers'
import { handle } from '../../utils/handle'

export default handle('printers.list', ({ room }) => listPrinters(room))
