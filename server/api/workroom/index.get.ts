import { getWorkroom } from '../../services/workroom'
import { handle } from '../../utils/handle'

export default handle('workroom.get', ({ room }) => getWorkroom(room))
