import { describeRoutes } from '../../shared/schemas/openapi'
import { handle } from '../utils/handle'

export default handle('openapi.get', () => describeRoutes())
