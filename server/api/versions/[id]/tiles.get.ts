import { printOfVersion } from '../../../services/print'
import { handle } from '../../../utils/handle'

export default handle('print.tiles', async ({ room, who, id, query }) => (await printOfVersion(room, id, query, who.unit)).set.plan)
