import { sql, type Kysely } from 'kysely'

/** A stretch test is finished, or a draft of one: never both and never neither. A photograph lies in the file store, under its name here. */
export async function up(db: Kysely<any>): Promise<void> {
  const run = (text: string) => sql.raw(text).execute(db)
  await run(`alter table stretch_test
    alter column test drop not null,
    add column draft jsonb,
    add column photo text,
    add column photo_width integer,
    add column photo_height integer,
    add column photo_at timestamptz,
    add constraint stretch_test_stands check (num_nonnulls(test, draft) = 1),
    add constraint stretch_test_photo check (num_nonnulls(photo, photo_width, photo_height, photo_at) in (0, 4))`)
}

export async function down(db: Kysely<any>): Promise<void> {
  const run = (text: string) => sql.raw(text).execute(db)
  await run(`delete from stretch_test where test is null`)
  await run(`alter table stretch_test
    drop constraint stretch_test_photo,
    drop constraint stretch_test_stands,
    drop column photo_at,
    drop column photo_height,
    drop column photo_width,
    drop column photo,
    drop column draft,
    alter column test set not null`)
}
