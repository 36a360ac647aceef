import { sql, type Kysely } from 'kysely'

/** Printers of a workroom that were measured: what their 100 mm square measures across and along the paper. */
export async function up(db: Kysely<any>): Promise<void> {
  const run = (text: string) => sql.raw(text).execute(db)
  await run(`create table printer (
    workroom_id uuid not null references workroom (id),
    id uuid not null default gen_random_uuid(),
    name text not null,
    across_mm double precision not null check (across_mm between 90 and 110),
    along_mm double precision not null check (along_mm between 90 and 110),
    measured_on date not null,
    saved_by uuid,
    archived_at timestamptz,
    primary key (workroom_id, id),
    foreign key (workroom_id, saved_by) references membership (workroom_id, account_id)
  )`)
  await run(`create unique index printer_of_name on printer (workroom_id, lower(name))`)
  await run(`alter table printer enable row level security`)
  await run(`alter table printer force row level security`)
  await run(`create policy own_workroom on printer
    using (workroom_id = nullif(current_setting('tenterframe.workroom', true), '')::uuid)
    with check (workroom_id = nullif(current_setting('tenterframe.workroom', true), '')::uuid)`)
  await run(`grant select, insert, update on printer to tenterframe_app`)
}

export async function down(db: Kysely<any>): Promise<void> {
  await sql.raw(`drop table printer`).execute(db)
}
