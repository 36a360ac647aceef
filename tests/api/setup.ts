import { randomBytes } from 'node:crypto'
import type { TestProject } from 'vitest/node'
import type { DemoIds } from '../../scripts/lib/demo'
import { startServer } from './server'
import { throwawayDatabase } from './throwaway'

declare module 'vitest' {
  interface ProvidedContext {
    readonly baseUrl: string
    readonly appUrl: string
    readonly ownerUrl: string
    readonly first: DemoIds
    readonly second: DemoIds
    readonly sessionPassword: string
  }
}

/** The built server on a throwaway database. */
export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  const { app, owner, seeded, drop } = await throwawayDatabase(new Date())
  try {
    const sessionPassword = randomBytes(24).toString('hex')
    const server = await startServer({
      NUXT_DATABASE_URL: app,
      NUXT_SESSION_PASSWORD: sessionPassword,
      NUXT_LOGIN_LIMIT: '10000',
      NUXT_FILES_DRIVER: 'memory',
    })
    project.provide('baseUrl', server.url)
    project.provide('appUrl', app)
    project.provide('ownerUrl', owner)
    project.provide('first', seeded.first)
    project.provide('second', seeded.second)
    project.provide('sessionPassword', sessionPassword)
    return async () => {
      await server.stop()
      await drop()
    }
  } catch (error) {
    await drop()
    throw error
  }
}
