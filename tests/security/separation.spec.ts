import pg from 'pg'
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'

let app: pg.Client
let owner: pg.Client

/** Rows that a statement gives in a workroom, or the code of its refusal. */
async function ask(
  client: pg.Client,
  workroom: string | null,
  statement: string,
  values: readonly unknown[] = [],
): Promise<readonly object[] | string> {
  await client.query('begin')
  try {
    if (workroom) await client.query(`select set_config('tenterframe.workroom', $1, true)`, [workroom])
    return (await client.query(statement, [...values])).rows
  } catch (error) {
    return (error as { code: string }).code
  } finally {
    await client.query('rollback')
  }
}

const DENIED = '42501'
const NO_SUCH_KEY = '23503'

let tables: string[]
const outside = ['account', 'session', 'login_attempt']

beforeAll(async () => {
  app = new pg.Client({ connectionString: inject('appUrl') })
  owner = new pg.Client({ connectionString: inject('ownerUrl') })
  await Promise.all([app.connect(), owner.connect()])
  const { rows } = await owner.query<{ name: string }>(
    `select table_name as name from information_schema.columns where table_schema = 'public' and column_name = 'workroom_id' and table_name <> 'session' order by 1`,
  )
  tables = rows.map((row) => row.name)
})
afterAll(() => Promise.all([app.end(), owner.end()]))

describe('workrooms in SQL, as the role that serves', () => {
  it('owns nothing and cannot pass the policies by', async () => {
    const role = await app.query(`select rolsuper, rolbypassrls, rolcreaterole, rolcreatedb from pg_roles where rolname = current_user`)
    expect(role.rows).toEqual([{ rolsuper: false, rolbypassrls: false, rolcreaterole: false, rolcreatedb: false }])
    const owned = await app.query(`select relname from pg_class where relowner = (select oid from pg_roles where rolname = current_user)`)
    expect(owned.rows).toEqual([])
  })

  it('finds every table of a workroom forced under its policy', async () => {
    expect(tables).toEqual([
      'bone_stock',
      'clearance',
      'client',
      'cloth',
      'fitting',
      'garment',
      'measuring',
      'membership',
      'printer',
      'stretch_test',
      'version',
      'version_body',
      'wearer',
      'wearer_flag',
      'working_copy',
    ])
    const { rows } = await owner.query(
      `select relname, relrowsecurity and relforcerowsecurity as forced from pg_class where relname = any($1) and relkind = 'r'`,
      [[...tables, 'workroom']],
    )
    expect(rows).toHaveLength(tables.length + 1)
    for (const row of rows) expect(row, row.relname).toMatchObject({ forced: true })
  })

  it('gives own rows, and not one of another workroom', async () => {
    const { workroom: first } = inject('first')
    const { workroom: second } = inject('second')
    for (const table of tables) {
      expect(await ask(app, first, `select 1 from ${table} where workroom_id <> $1`, [first]), table).toEqual([])
      expect(await ask(app, first, `select 1 from ${table} where workroom_id = $1`, [second]), table).toEqual([])
      expect(await ask(app, null, `select 1 from ${table}`), table).toEqual([])
      const own = await ask(app, first, `select 1 from ${table} limit 1`)
      expect(own, table).toHaveLength(1)
    }
    expect(await ask(app, first, 'select id from workroom')).toEqual([{ id: first }])
  })

  it('neither puts a row into another workroom nor moves one there', async () => {
    const { workroom: first } = inject('first')
    const { workroom: second } = inject('second')
    expect(await ask(app, first, `insert into client (workroom_id, name, name_key) values ($1, 'x', 'x')`, [second])).toBe(DENIED)
    expect(await ask(app, first, `update client set workroom_id = $1`, [second])).toBe(DENIED)
  })

  it('reaches accounts, sessions and attempts through the named functions alone', async () => {
    for (const table of outside) {
      for (const statement of [`select 1 from ${table}`, `delete from ${table}`, `insert into ${table} default values`]) {
        expect(await ask(app, null, statement), statement).toBe(DENIED)
      }
    }
    const { rows } = await owner.query<{ name: string; app: boolean }>(
      `select proname as name, has_function_privilege('tenterframe_app', oid, 'execute') as app from pg_proc
       where pronamespace = 'public'::regnamespace and prosecdef order by 1`,
    )
    expect(rows.filter((row) => row.app).map((row) => row.name)).toEqual([
      'account_for_sign_in',
      'account_set_unit',
      'account_workrooms',
      'login_attempt_clear',
      'login_attempt_count',
      'login_attempt_read',
      'schema_version',
      'session_end',
      'session_end_all',
      'session_find',
      'session_start',
      'version_body_erase',
      'workroom_members',
    ])
    expect(rows.filter((row) => !row.app).map((row) => row.name)).toEqual(['account_create', 'membership_add', 'workroom_found'])
    const open = await owner.query(
      `select proname from pg_proc where pronamespace = 'public'::regnamespace and prosecdef and (proconfig is null or not 'search_path=public, pg_temp' = any(proconfig))`,
    )
    expect(open.rows).toEqual([])
  })

  it('lists the members of the workroom that is set, and of none without', async () => {
    const members = await ask(app, inject('first').workroom, 'select account_id from workroom_members()')
    expect(members).toHaveLength(3)
    expect(await ask(app, null, 'select account_id from workroom_members()')).toEqual([])
  })

  it('has no right to change or remove a version, its body or its clearance', async () => {
    const { workroom } = inject('first')
    for (const table of ['version', 'version_body', 'clearance']) {
      expect(await ask(app, workroom, `update ${table} set workroom_id = workroom_id`), table).toBe(DENIED)
      expect(await ask(app, workroom, `delete from ${table}`), table).toBe(DENIED)
    }
    for (const table of tables) expect(await ask(app, workroom, `delete from ${table}`), table).toBe(DENIED)
  })

  it('blanks the bodies of one wearer by the function for it, and of its own workroom alone', async () => {
    const { workroom } = inject('second')
    const [row] = (await ask(app, workroom, 'select wearer_id from version_body limit 1')) as readonly { wearer_id: string }[]
    const erase = (room: string | null) => ask(app, room, 'select version_body_erase($1, now()) as blanked', [row!.wearer_id])
    expect(await erase(inject('first').workroom)).toEqual([{ blanked: 0 }])
    expect(await erase(null)).toEqual([{ blanked: 0 }])
    expect(await erase(workroom)).toEqual([{ blanked: 1 }])
  })
})

describe('composite keys', () => {
  it('start with the workroom everywhere', async () => {
    const { rows } = await owner.query<{ name: string; first: string }>(
      `select c.relname as name, a.attname as first from pg_constraint k join pg_class c on c.oid = k.conrelid
       join pg_attribute a on a.attrelid = c.oid and a.attnum = k.conkey[1]
       where k.contype in ('p', 'u') and c.relname = any($1)`,
      [tables],
    )
    expect(rows.length).toBeGreaterThanOrEqual(tables.length)
    for (const row of rows) expect(row.first, row.name).toBe('workroom_id')
  })

  it('let no row point into another workroom, not even for the owner of the tables', async () => {
    const { workroom: first } = inject('first')
    const [wearer] = (await ask(owner, inject('second').workroom, 'select id, client_id from wearer limit 1')) as readonly {
      id: string
      client_id: string
    }[]
    for (const client of [app, owner]) {
      expect(
        await ask(client, first, `insert into wearer (workroom_id, client_id, name) values ($1, $2, 'x')`, [first, wearer!.client_id]),
      ).toBe(NO_SUCH_KEY)
      expect(
        await ask(client, first, `insert into garment (workroom_id, wearer_id, code, name, stage) values ($1, $2, 'X', 'x', 'enquiry')`, [
          first,
          wearer!.id,
        ]),
      ).toBe(NO_SUCH_KEY)
    }
  })
})
