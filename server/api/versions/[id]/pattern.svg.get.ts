import { exchangeFile } from '../../../print/exchange-file'
import { handle } from '../../../utils/handle'

export default handle('print.svg', ({ event, room, who, id, query }) => exchangeFile(event, 'svg', room, id, query.lines, who.unit))
