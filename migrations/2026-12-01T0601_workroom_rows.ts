import { sql, type Kysely } from 'kysely'

/**
 * Everything a workroom owns. Keys are composite, because foreign and unique keys ignore the policies: a row can only
 * point at a row of its own workroom.
 */
export async function up(db: Kysely<any>): Promise<void> {
  const run = (text: string) => sql.raw(text).execute(db)
  const head = `workroom_id uuid not null references workroom (id), id uuid not null default gen_random_uuid()`
  const saved = `revision integer not null default 1, created_at timestamptz not null default now(), updated_at timestamptz not null default now(), updated_by uuid`
  const member = (column: string) => `foreign key (workroom_id, ${column}) references membership (workroom_id, account_id)`

  await run(`create table client (${head}, ${saved},
    name text not null,
    name_key text collate "C" not null,
    email text,
    phone text,
    note text,
    archived_at timestamptz,
    primary key (workroom_id, id),
    ${member('updated_by')}
  )`)
  await run(`create index client_by_name on client (workroom_id, name_key, id)`)

  await run(`create table wearer (${head}, ${saved},
    client_id uuid not null,
    name text not null,
    born_on date,
    guardian text,
    note text,
    primary key (workroom_id, id),
    foreign key (workroom_id, client_id) references client (workroom_id, id),
    ${member('updated_by')}
  )`)
  await run(`create index wearer_of_client on wearer (workroom_id, client_id)`)

  await run(`create table wearer_flag (
    workroom_id uuid not null,
    wearer_id uuid not null,
    pregnancy boolean not null,
    nursing boolean not null,
    reflux boolean not null,
    breathing boolean not null,
    circulation boolean not null,
    child boolean not null,
    practitioner_agreed boolean not null,
    purpose text not null,
    consent_noted boolean not null check (consent_noted),
    consent_by text,
    noted_at timestamptz not null,
    noted_by uuid,
    primary key (workroom_id, wearer_id),
    foreign key (workroom_id, wearer_id) references wearer (workroom_id, id),
    ${member('noted_by')}
  )`)
  await run(`comment on table wearer_flag is 'Health data: owner and drafter only, erasable.'`)

  await run(`create table measuring (${head}, ${saved},
    wearer_id uuid not null,
    measured_on date not null,
    measured_by text,
    note text,
    "values" jsonb not null,
    primary key (workroom_id, id),
    foreign key (workroom_id, wearer_id) references wearer (workroom_id, id),
    ${member('updated_by')}
  )`)
  await run(`create index measuring_of_wearer on measuring (workroom_id, wearer_id, measured_on desc)`)

  await run(`create table cloth (${head}, ${saved},
    code text not null,
    name text not null,
    lot text,
    supplier text,
    composition text not null,
    mass double precision,
    thickness double precision not null,
    width double precision,
    note text,
    archived_at timestamptz,
    primary key (workroom_id, id),
    unique (workroom_id, code),
    ${member('updated_by')}
  )`)

  await run(`create table stretch_test (${head}, ${saved},
    cloth_id uuid not null,
    tested_on date not null,
    tester text,
    cycles integer,
    note text,
    test jsonb not null,
    archived_at timestamptz,
    primary key (workroom_id, id),
    foreign key (workroom_id, cloth_id) references cloth (workroom_id, id),
    ${member('updated_by')}
  )`)
  await run(`create index stretch_test_of_cloth on stretch_test (workroom_id, cloth_id)`)

  await run(`create table garment (${head}, ${saved},
    code text not null,
    name text not null,
    wearer_id uuid not null,
    due_on date,
    stage text not null,
    note text,
    archived_at timestamptz,
    primary key (workroom_id, id),
    unique (workroom_id, code),
    foreign key (workroom_id, wearer_id) references wearer (workroom_id, id),
    ${member('updated_by')}
  )`)
  await run(`create index garment_of_wearer on garment (workroom_id, wearer_id)`)

  await run(`create table working_copy (
    workroom_id uuid not null,
    garment_id uuid not null,
    revision integer not null default 1,
    document jsonb not null,
    good jsonb,
    good_revision integer,
    outlines jsonb,
    saved_at timestamptz not null,
    saved_by uuid,
    primary key (workroom_id, garment_id),
    foreign key (workroom_id, garment_id) references garment (workroom_id, id),
    ${member('saved_by')}
  )`)

  await run(`create table version (
    workroom_id uuid not null,
    id uuid not null default gen_random_uuid(),
    garment_id uuid not null,
    number integer not null,
    name text not null,
    note text,
    engine text not null,
    stops integer not null,
    cautions integer not null,
    barred boolean not null,
    kept jsonb not null,
    saved_at timestamptz not null,
    saved_by uuid,
    primary key (workroom_id, id),
    unique (workroom_id, garment_id, number),
    foreign key (workroom_id, garment_id) references garment (workroom_id, id),
    ${member('saved_by')}
  )`)

  await run(`create table version_body (
    workroom_id uuid not null,
    version_id uuid not null,
    wearer_id uuid not null,
    wearer_name text,
    body jsonb,
    erased_at timestamptz,
    primary key (workroom_id, version_id),
    foreign key (workroom_id, version_id) references version (workroom_id, id),
    foreign key (workroom_id, wearer_id) references wearer (workroom_id, id)
  )`)
  await run(`create index version_body_of_wearer on version_body (workroom_id, wearer_id)`)

  await run(`create table clearance (
    workroom_id uuid not null,
    version_id uuid not null,
    cleared_at timestamptz not null,
    cleared_by uuid not null,
    by_name text,
    reason text,
    primary key (workroom_id, version_id),
    foreign key (workroom_id, version_id) references version (workroom_id, id),
    ${member('cleared_by')}
  )`)

  const changing = ['client', 'wearer', 'wearer_flag', 'measuring', 'cloth', 'stretch_test', 'garment', 'working_copy']
  const lasting = ['version', 'version_body', 'clearance']
  for (const table of [...changing, ...lasting]) {
    await run(`alter table ${table} enable row level security`)
    await run(`alter table ${table} force row level security`)
    await run(`create policy own_workroom on ${table}
      using (workroom_id = nullif(current_setting('tenterframe.workroom', true), '')::uuid)
      with check (workroom_id = nullif(current_setting('tenterframe.workroom', true), '')::uuid)`)
  }
  await run(`grant select, insert, update on ${changing.join(', ')} to tenterframe_app`)
  await run(`grant select, insert on ${lasting.join(', ')} to tenterframe_app`)

  await run(`create function version_body_erase(given_wearer uuid, given_now timestamptz) returns integer language sql security definer
    set search_path = public, pg_temp as $body$
      with blanked as (
        update version_body set wearer_name = null, body = null, erased_at = given_now
        where workroom_id = nullif(current_setting('tenterframe.workroom', true), '')::uuid and wearer_id = given_wearer and erased_at is null
        returning 1
      )
      select count(*)::integer from blanked
    $body$`)
  await run(`revoke all on function version_body_erase(uuid, timestamptz) from public`)
  await run(`grant execute on function version_body_erase(uuid, timestamptz) to tenterframe_app`)
}

export async function down(db: Kysely<any>): Promise<void> {
  const run = (text: string) => sql.raw(text).execute(db)
  await run(`drop function version_body_erase(uuid, timestamptz)`)
  await run(
    `drop table clearance, version_body, version, working_copy, garment, stretch_test, cloth, measuring, wearer_flag, wearer, client`,
  )
}
