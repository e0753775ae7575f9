import { readdir } from 'node:fs/promises';
import path from 'node:path';
import pg from 'pg';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { sequelizeCli } from '@/lib/scripts/migrate.mjs';
import * as models from '@/models';

const MIGRATIONS = path.resolve(import.meta.dirname, '../../migrations');
const owner = inject('ownerUrl');
const NAME = 'ohmstead_migrations';
const url = owner.replace(/\/[^/]*$/, `/${NAME}`);

let server: pg.Client;
let database: pg.Client;
beforeAll(async () => {
  server = new pg.Client({ connectionString: owner });
  await server.connect();
  await server.query(`create database ${NAME}`);
  database = new pg.Client({ connectionString: url });
  await database.connect();
});
afterAll(async () => {
  await database.end();
  await server.query(`drop database ${NAME}`);
  await server.end();
});

/** Everything that a migration can leave: columns, constraints, indexes, triggers, functions. */
async function describeSchema(): Promise<string[]> {
  const { rows } = await database.query<{ line: string }>(`
    select 'column ' || table_name || '.' || column_name || ' ' || data_type || ' ' || is_nullable || ' ' || coalesce(column_default, '') as line
      from information_schema.columns where table_schema = 'public' and table_name <> 'SequelizeMeta'
    union all select 'constraint ' || conrelid::regclass || ' ' || pg_get_constraintdef(oid) from pg_constraint
      where connamespace = 'public'::regnamespace and conrelid <> 0 and conrelid::regclass::text <> '"SequelizeMeta"'
    union all select 'index ' || indexdef from pg_indexes where schemaname = 'public' and tablename <> 'SequelizeMeta'
    union all select 'trigger ' || tgrelid::regclass || ' ' || tgname from pg_trigger where not tgisinternal
    union all select 'function ' || proname from pg_proc where pronamespace = 'public'::regnamespace
    union all select 'options ' || relname || ' ' || reloptions::text from pg_class where relnamespace = 'public'::regnamespace and reloptions is not null
    union all select 'compression ' || attrelid::regclass || '.' || attname || ' ' || attcompression::text from pg_attribute
      where attrelid in (select oid from pg_class where relnamespace = 'public'::regnamespace) and attcompression <> ''
    order by 1`);
  return rows.map(({ line }) => line);
}

const cli = async (command: string) => {
  const { status, output } = await sequelizeCli(command, url);
  expect(status, output).toBe(0);
};

describe('migrations', () => {
  it('go up, one by one down to nothing, and up to the same again', async () => {
    const files = (await readdir(MIGRATIONS)).filter((name) => name.endsWith('.cjs'));
    expect(await describeSchema()).toEqual([]);
    await cli('db:migrate');
    const up = await describeSchema();
    expect(up.length).toBeGreaterThan(100);
    for (const _ of files) await cli('db:migrate:undo');
    expect(await describeSchema()).toEqual([]);
    await cli('db:migrate');
    expect(await describeSchema()).toEqual(up);
  }, 60_000);

  it('store drawings as they are designed: a narrow head that updates in place, compressed bodies', async () => {
    const lines = await describeSchema();
    expect(lines).toContain('options drawings {fillfactor=70}');
    expect(lines).toContain('compression drawing_snapshots.body l');
    expect(lines).toContain('compression drawing_changes.patch l');
  });

  it('put the team into every table of a team and first into each of its keys', async () => {
    const before = ['logins', 'sign_in_counts', 'teams']; // asked before a team is known, or the team itself
    const { rows } = await database.query<{ table: string; definition: string }>(`
      select conrelid::regclass::text as table, pg_get_constraintdef(oid) as definition from pg_constraint
       where contype in ('p', 'u') and connamespace = 'public'::regnamespace and conrelid::regclass::text <> '"SequelizeMeta"'`);
    const keys = rows.filter(({ table }) => !before.includes(table));
    expect(keys.length).toBeGreaterThan(15);
    for (const { table, definition } of keys) expect(`${table}: ${definition}`).toMatch(/\(team_id[,)]/);
  });

  it('have a column for every field of every model, and no other', async () => {
    const { rows } = await database.query<{ table_name: string; column_name: string }>(
      `select table_name, column_name from information_schema.columns where table_schema = 'public' and table_name not in ('SequelizeMeta', 'sign_in_counts')`,
    );
    const columns = rows.map((row) => `${row.table_name}.${row.column_name}`).sort();
    const fields = Object.values(models.sequelize.models)
      .flatMap((model) =>
        Object.values(model.getAttributes()).map(({ field }) => `${model.getTableName() as string}.${field}`),
      )
      .sort();
    expect(fields).toEqual(columns);
  });

  it('give the app a role that owns nothing and can make no table', async () => {
    const app = new pg.Client({ connectionString: inject('databaseUrl') });
    await app.connect();
    try {
      const { rows } = await app.query(
        `select count(*)::int as owned from pg_class c join pg_roles r on r.oid = c.relowner where r.rolname = current_user`,
      );
      expect(rows[0].owned).toBe(0);
      await expect(app.query('create table mine (id int)')).rejects.toThrow(/permission denied/);
      await expect(app.query('alter table audit_entries disable trigger all')).rejects.toThrow(/must be owner/);
      await expect(app.query('truncate audit_entries')).rejects.toThrow(/permission denied/);
    } finally {
      await app.end();
    }
  });
});
