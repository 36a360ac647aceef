import { handle } from '../../utils/handle'
import { sessionIdOf } from '../../utils/who'

/** Clearing the cookie ends the row too: see the start plugin. */
export default handle('session.signOut', async ({ event }) => {
  if ((await sessionIdOf(event)) !== null) await clearUserSession(event)
  return { done: true as const }
})
