import { getClient } from '../../../services/clients'
import { handle } from '../../../utils/handle'

export default handle('clients.get', ({ room, id }) => getClient(room, id))
