import { signOutEverywhere } from '../../services/session'
import { database } from '../../utils/database'
import { handle } from '../../utils/handle'

export default handle('session.signOutEverywhere', async ({ event, who, now }) => {
  await signOutEverywhere(database(), who.sid, now)
  await clearUserSession(event)
  return { done: true as const }
})
