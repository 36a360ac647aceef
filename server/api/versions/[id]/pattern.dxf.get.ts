import { exchangeFile } from '../../../print/exchange-file'
import { handle } from '../../../utils/handle'

export default handle('print.dxf', ({ event, room, who, id, query }) => exchangeFile(event, 'dxf', room, id, query.lines, who.unit))
