import { sql, type Kysely } from 'kysely'

/** What was seen at a fitting of a version, level by level. Written once and kept. */
export async function up(db: Kysely<any>): Promise<void> {
  const run = (text: string) => sql.raw(text).execute(db)
  await run(`create table fitting (
    workroom_id uuid not null references workroom (id),
    id uuid not null default gen_random_uuid(),
    garment_id uuid not null,
    version_id uuid not null,
    fitted_on date not null,
    note text,
    levels jsonb not null,
    saved_at timestamptz not null,
    saved_by uuid,
    primary key (workroom_id, id),
    foreign key (workroom_id, garment_id) references garment (workroom_id, id),
    foreign key (workroom_id, version_id) references version (workroom_id, id),
    foreign key (workroom_id, saved_by) references membership (workroom_id, account_id)
  )`)
  await run(`create index fitting_of_garment on fitting (workroom_id, garment_id)`)
  await run(`alter table fitting enable row level security`)
  await run(`alter table fitting force row level security`)
  await run(`create policy own_workroom on fitting
    using (workroom_id = nullif(current_setting('tenterframe.workroom', true), '')::uuid)
    with check (workroom_id = nullif(current_setting('tenterframe.workroom', true), '')::uuid)`)
  await run(`grant select, insert on fitting to tenterframe_app`)
}

export async function down(db: Kysely<any>): Promise<void> {
  await sql.raw(`drop table fitting`).execute(db)
}
