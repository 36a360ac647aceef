import { printOfVersion } from '../../../services/print'
import { handle } from '../../../utils/handle'

export default handle('print.tiles', async ({ room, who, id, query }) => {
  const { set, outlines } = await printOfVersion(room, id, query, who.unit)
  return { ...set.plan, outlines }
})
