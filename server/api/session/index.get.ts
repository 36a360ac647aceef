import { meOf } from '../../services/session'
import { demoFacts } from '../../utils/demo'
import { handle } from '../../utils/handle'

export default handle('session.get', ({ who }) => meOf(who, demoFacts()))
