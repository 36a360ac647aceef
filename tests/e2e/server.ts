import { randomBytes } from 'node:crypto'
import { startServer } from '../api/server'
import { throwawayDatabase } from '../api/throwaway'

/** The built server with the demo on a throwaway database, until it is told to stop. Called with the port. */
const { app, drop } = await throwawayDatabase(new Date())
try {
  const env = {
    NUXT_DATABASE_URL: app,
    NUXT_SESSION_PASSWORD: randomBytes(24).toString('hex'),
    NUXT_DEMO: '1',
    NUXT_LOGIN_LIMIT: '10000',
    TENTERFRAME_CHECK_ANSWERS: process.env.TENTERFRAME_CHECK_ANSWERS ?? '1',
    NUXT_FILES_DRIVER: 'memory',
  }
  const server = await startServer(env, Number(process.argv[2]))
  console.log(server.url)
  await new Promise<void>((done) => {
    for (const signal of ['SIGTERM', 'SIGINT'] as const) process.once(signal, done)
  })
  await server.stop()
} finally {
  await drop()
}
