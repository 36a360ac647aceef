import { sql, type Kysely } from 'kysely'

/** What a workroom's bones are cut from, beside the list the product comes with. A garment keeps a copy of what its bones use. */
export async function up(db: Kysely<any>): Promise<void> {
  const run = (text: string) => sql.raw(text).execute(db)
  await run(`create table bone_stock (
    workroom_id uuid not null references workroom (id),
    id uuid not null default gen_random_uuid(),
    name text not null,
    stock jsonb not null,
    saved_by uuid,
    archived_at timestamptz,
    primary key (workroom_id, id),
    foreign key (workroom_id, saved_by) references membership (workroom_id, account_id)
  )`)
  await run(`create unique index bone_stock_of_name on bone_stock (workroom_id, lower(name))`)
  await run(`alter table bone_stock enable row level security`)
  await run(`alter table bone_stock force row level security`)
  await run(`create policy own_workroom on bone_stock
    using (workroom_id = nullif(current_setting('tenterframe.workroom', true), '')::uuid)
    with check (workroom_id = nullif(current_setting('tenterframe.workroom', true), '')::uuid)`)
  await run(`grant select, insert, update on bone_stock to tenterframe_app`)
}

export async function down(db: Kysely<any>): Promise<void> {
  await sql.raw(`drop table bone_stock`).execute(db)
}
