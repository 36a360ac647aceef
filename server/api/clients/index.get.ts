import { listClients } from '../../services/clients'
import { handle } from '../../utils/handle'

export default handle('clients.list', ({ room, query }) => listClients(room, query))
