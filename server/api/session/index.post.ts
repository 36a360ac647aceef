import { getRequestIP } from 'h3'
import { meOf, readSession, signIn } from '../../services/session'
import { database } from '../../utils/database'
import { demoFacts } from '../../utils/demo'
import { handle } from '../../utils/handle'
import { signInLimit } from '../../utils/sign-in-limit'

let dummy: Promise<string> | null = null
const dummyHash = () => (dummy ??= hashPassword('nobody signs in with this'))

export default handle('session.signIn', async ({ event, body, now }) => {
  const limit = signInLimit(Number(useRuntimeConfig(event).loginLimit))
  const address = getRequestIP(event) ?? 'unknown'
  const sid = await signIn(database(), { ...body, address }, { verify: verifyPassword, dummyHash, limit }, now)
  await replaceUserSession(event, { secure: { sid } })
  return meOf((await readSession(database(), sid, now)) ?? null, demoFacts())
})
