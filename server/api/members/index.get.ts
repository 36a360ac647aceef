import { listMembers } from '../../services/workroom'
import { handle } from '../../utils/handle'

export default handle('members.list', ({ room }) => listMembers(room))
