import { sessionHooks } from '#imports'
import { filesProblem } from '../files/store'
import { signOut } from '../services/session'
import { closeDatabase, database, schemaState } from '../utils/database'

const PASSWORD_LENGTH = 32

function refuseToStart(why: string): never {
  console.error(why)
  process.exit(1)
}

/** Checks at the start what would fail later: the session password, the database, its schema. */
export default defineNitroPlugin(async (nitro) => {
  sessionHooks.hook('clear', async ({ secure }) => {
    if (secure?.sid) await signOut(database(), secure.sid, new Date())
  })
  nitro.hooks.hook('close', closeDatabase)
  if (import.meta.prerender) return

  const config = useRuntimeConfig()
  if ((config.session.password ?? '').length < PASSWORD_LENGTH)
    refuseToStart(`NUXT_SESSION_PASSWORD must have ${PASSWORD_LENGTH} characters or more.`)
  if (!config.databaseUrl) refuseToStart('NUXT_DATABASE_URL is not set.')
  const noFiles = filesProblem(config.files)
  if (noFiles) refuseToStart(noFiles)
  const state = await schemaState().catch((error: unknown) =>
    refuseToStart(`The database does not answer, or was never migrated: ${String(error)}`),
  )
  if (!state.ready)
    refuseToStart(`The database has the schema ${state.schema || 'none'}, which is older than this server. Migrate it first.`)
})
