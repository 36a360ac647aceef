import { sql } from 'kysely'
import { createDatabase } from '../server/db/client'
import { seedDemo } from './lib/demo'

const owner = process.env.NUXT_DATABASE_OWNER_URL
if (!owner) {
  console.error('NUXT_DATABASE_OWNER_URL is not set: the owner of the database loads the demo.')
  process.exit(1)
}

const asOwner = createDatabase(owner, 2)
try {
  const { rows } = await sql<{ count: number }>`select count(*) as count from workroom`.execute(asOwner)
  if (rows[0]!.count === 0) {
    await seedDemo(asOwner, new Date())
    console.log('The demo workroom is loaded.')
  }
} finally {
  await asOwner.destroy()
}
