import { createClient } from '../../services/clients'
import { handle } from '../../utils/handle'

export default handle('clients.create', ({ room, body }) => createClient(room, body))
