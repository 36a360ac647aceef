import { archiveClient } from '../../../services/clients'
import { handle } from '../../../utils/handle'

export default handle('clients.archive', ({ room, id }) => archiveClient(room, id, true))
