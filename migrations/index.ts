import type { Migration } from 'kysely'
import * as accounts from './2026-12-01T0600_accounts'
import * as workroomRows from './2026-12-01T0601_workroom_rows'
import * as fittings from './2026-12-01T1100_fittings'
import * as unfinishedTests from './2026-12-01T1200_unfinished_tests'
import * as printers from './2026-12-01T1330_printers'
import * as boneStock from './2026-12-01T1450_bone_stock'

/** Every migration by its file name, in order. A test holds this list against the folder. */
export const migrations: Readonly<Record<string, Migration>> = {
  '2026-12-01T0600_accounts': accounts,
  '2026-12-01T0601_workroom_rows': workroomRows,
  '2026-12-01T1100_fittings': fittings,
  '2026-12-01T1200_unfinished_tests': unfinishedTests,
  '2026-12-01T1330_printers': printers,
  '2026-12-01T1450_bone_stock': boneStock,
}

/** The newest migration: a server built with it refuses an older schema. */
export const newestMigration = Object.keys(migrations).sort().at(-1)!
