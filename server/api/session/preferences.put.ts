import { chooseUnit, meOf } from '../../services/session'
import { database } from '../../utils/database'
import { demoFacts } from '../../utils/demo'
import { handle } from '../../utils/handle'

export default handle('session.preferences', async ({ who, body }) => {
  await chooseUnit(database(), who.sid, body.unit)
  return meOf({ ...who, unit: body.unit }, demoFacts())
})
