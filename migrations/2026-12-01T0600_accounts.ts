import { sql, type Kysely } from 'kysely'

/**
 * Accounts, sessions and counted attempts stand outside row-level security. The role that serves has no right on them:
 * it reaches them through the functions below alone, each running as the owner.
 */
export async function up(db: Kysely<any>): Promise<void> {
  const run = (text: string) => sql.raw(text).execute(db)

  await run(`grant usage on schema public to tenterframe_app`)

  await run(`create table account (
    id uuid primary key default gen_random_uuid(),
    email text not null unique check (email = lower(email)),
    name text not null,
    password_hash text not null,
    unit text not null default 'cm' check (unit in ('cm', 'in')),
    created_at timestamptz not null default now(),
    disabled_at timestamptz
  )`)

  await run(`create table workroom (
    id uuid primary key default gen_random_uuid(),
    name text not null,
    zone text not null,
    settings jsonb not null,
    revision integer not null default 1,
    created_at timestamptz not null default now()
  )`)

  await run(`create table membership (
    workroom_id uuid not null references workroom (id),
    account_id uuid not null references account (id),
    role text not null check (role in ('owner', 'drafter', 'maker')),
    name text not null,
    created_at timestamptz not null default now(),
    ended_at timestamptz,
    primary key (workroom_id, account_id)
  )`)
  await run(`create index membership_account on membership (account_id)`)

  await run(`create table session (
    id uuid primary key default gen_random_uuid(),
    account_id uuid not null references account (id),
    workroom_id uuid not null,
    started_at timestamptz not null,
    seen_at timestamptz not null,
    expires_at timestamptz not null,
    ended_at timestamptz,
    foreign key (workroom_id, account_id) references membership (workroom_id, account_id)
  )`)
  await run(`create index session_account on session (account_id)`)

  await run(`create table login_attempt (key text primary key, points integer not null default 0, expire bigint)`)

  await run(`alter table workroom enable row level security`)
  await run(`alter table workroom force row level security`)
  await run(`create policy own_workroom on workroom using (id = nullif(current_setting('tenterframe.workroom', true), '')::uuid)`)
  await run(`create policy owner_founds on workroom to current_user using (true) with check (true)`)
  await run(`alter table membership enable row level security`)
  await run(`alter table membership force row level security`)
  await run(
    `create policy own_workroom on membership using (workroom_id = nullif(current_setting('tenterframe.workroom', true), '')::uuid)`,
  )
  await run(`create policy owner_founds on membership to current_user using (true) with check (true)`)
  await run(`grant select on workroom, membership to tenterframe_app`)
  await run(`grant update (name, zone, settings, revision) on workroom to tenterframe_app`)

  const define = async (signature: string, returns: string, language: 'sql' | 'plpgsql', body: string, forApp = true) => {
    await run(`create function ${signature} returns ${returns} language ${language} security definer
      set search_path = public, pg_temp as $body$ ${body} $body$`)
    const bare = signature.replace(/\(([^)]*)\)/, (_, list: string) => `(${list.replace(/\b\w+ (\w+)(,|$)/g, '$1$2')})`)
    await run(`revoke all on function ${bare} from public`)
    if (forApp) await run(`grant execute on function ${bare} to tenterframe_app`)
  }

  await define(
    'account_create(given_email text, given_name text, given_hash text)',
    'uuid',
    'sql',
    `insert into account (email, name, password_hash) values (lower(given_email), given_name, given_hash) returning id`,
    false,
  )
  await define(
    'workroom_found(given_name text, given_zone text, given_settings jsonb, given_account uuid)',
    'uuid',
    'sql',
    `with made as (insert into workroom (name, zone, settings) values (given_name, given_zone, given_settings) returning id),
       joined as (insert into membership (workroom_id, account_id, role, name)
         select made.id, account.id, 'owner', account.name from made, account where account.id = given_account returning workroom_id)
     select workroom_id from joined`,
    false,
  )
  await define(
    'membership_add(given_workroom uuid, given_account uuid, given_role text)',
    'void',
    'sql',
    `insert into membership (workroom_id, account_id, role, name)
       select given_workroom, account.id, given_role, account.name from account where account.id = given_account`,
    false,
  )

  await define(
    'account_for_sign_in(given_email text)',
    'table (account_id uuid, password_hash text)',
    'sql',
    `select id, account.password_hash from account where email = lower(given_email) and disabled_at is null`,
  )
  await define(
    'account_workrooms(given_account uuid)',
    'table (workroom_id uuid, role text, name text)',
    'sql',
    `select workroom.id, membership.role, workroom.name from membership join workroom on workroom.id = membership.workroom_id
       where membership.account_id = given_account and membership.ended_at is null order by membership.created_at, workroom.id`,
  )
  await define(
    'account_set_unit(given_session uuid, given_unit text)',
    'void',
    'sql',
    `update account set unit = given_unit where id = (select account_id from session where id = given_session and ended_at is null)`,
  )
  await define(
    'session_start(given_account uuid, given_workroom uuid, given_now timestamptz, given_expires timestamptz)',
    'uuid',
    'sql',
    `insert into session (account_id, workroom_id, started_at, seen_at, expires_at)
       values (given_account, given_workroom, given_now, given_now, given_expires) returning id`,
  )
  await define(
    'session_find(given_session uuid, given_now timestamptz)',
    'table (account_id uuid, account_name text, email text, unit text, workroom_id uuid, workroom_name text, zone text, role text)',
    'plpgsql',
    `begin
       update session set seen_at = given_now where session.id = given_session and ended_at is null and seen_at < given_now - interval '1 minute';
       return query
         select account.id, account.name, account.email, account.unit, workroom.id, workroom.name, workroom.zone, membership.role
         from session
         join account on account.id = session.account_id and account.disabled_at is null
         join membership on membership.account_id = session.account_id and membership.workroom_id = session.workroom_id and membership.ended_at is null
         join workroom on workroom.id = session.workroom_id
         where session.id = given_session and session.ended_at is null and session.expires_at > given_now;
     end`,
  )
  await define(
    'session_end(given_session uuid, given_now timestamptz)',
    'void',
    'sql',
    `update session set ended_at = given_now where id = given_session and ended_at is null`,
  )
  await define(
    'session_end_all(given_session uuid, given_now timestamptz)',
    'void',
    'sql',
    `update session set ended_at = given_now where ended_at is null
       and account_id = (select account_id from session as mine where mine.id = given_session and mine.ended_at is null)`,
  )
  await define(
    'workroom_members()',
    'table (account_id uuid, name text, email text, role text, since timestamptz)',
    'sql',
    `select membership.account_id, membership.name, account.email, membership.role, membership.created_at
       from membership join account on account.id = membership.account_id
       where membership.workroom_id = nullif(current_setting('tenterframe.workroom', true), '')::uuid and membership.ended_at is null
       order by membership.created_at, membership.name`,
  )

  await define(
    'login_attempt_count(given_key text, given_points integer, given_expire bigint, given_now bigint, given_force boolean)',
    'table (points integer, expire bigint)',
    'plpgsql',
    `begin
       delete from login_attempt where login_attempt.expire < given_now - 3600000;
       return query
         insert into login_attempt as kept values (given_key, given_points, given_expire)
         on conflict (key) do update set
           points = case when kept.expire <= given_now or given_force then given_points else kept.points + given_points end,
           expire = case when kept.expire <= given_now or given_force then given_expire else kept.expire end
         returning kept.points, kept.expire;
     end`,
  )
  await define(
    'login_attempt_read(given_key text, given_now bigint)',
    'table (points integer, expire bigint)',
    'sql',
    `select points, expire from login_attempt where key = given_key and (expire > given_now or expire is null)`,
  )
  await define(
    'login_attempt_clear(given_key text)',
    'integer',
    'sql',
    `with gone as (delete from login_attempt where key = given_key returning 1) select count(*)::integer from gone`,
  )

  await define('schema_version()', 'text', 'sql', `select max(name)::text from kysely_migration`)
}

export async function down(db: Kysely<any>): Promise<void> {
  const run = (text: string) => sql.raw(text).execute(db)
  await run(`drop function account_create(text, text, text), workroom_found(text, text, jsonb, uuid), membership_add(uuid, uuid, text),
    account_for_sign_in(text), account_workrooms(uuid), account_set_unit(uuid, text), session_start(uuid, uuid, timestamptz, timestamptz),
    session_find(uuid, timestamptz), session_end(uuid, timestamptz), session_end_all(uuid, timestamptz), workroom_members(),
    login_attempt_count(text, integer, bigint, bigint, boolean), login_attempt_read(text, bigint), login_attempt_clear(text), schema_version()`)
  await run(`drop table login_attempt, session, membership, workroom, account`)
}
