import { archiveClient } from '../../../services/clients'
import { handle } from '../../../utils/handle'

export default handle('clients.restore', ({ room, id }) => archiveClient(room, id, false))
