import { updateClient } from '../../../services/clients'
import { handle } from '../../../utils/handle'

export default handle('clients.update', ({ room, id, body }) => updateClient(room, id, body))
