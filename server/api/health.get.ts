import { ENGINE } from '../../shared/domain/garment/solve'
import { schemaState } from '../utils/database'
import { handle } from '../utils/handle'

export default handle('health.get', async () => ({ ...(await schemaState()), engine: ENGINE }))
