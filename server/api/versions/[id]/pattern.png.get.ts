import { exchangeFile } from '../../../print/exchange-file'
import { handle } from '../../../utils/handle'

export default handle('print.png', ({ event, room, who, id, query }) => exchangeFile(event, 'png', room, id, query.lines, who.unit))
