import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Migration } from '@mikro-orm/migrations';
import { MikroORM } from '@mikro-orm/sqlite';
import { afterEach, describe, expect, it } from 'vitest';
import { ormOptions } from '../mikro-orm.config.ts';
import { migrationsList } from './migrations/list.ts';
import { migrate, openDatabase } from './orm.ts';

const folders: string[] = [];
const newFile = (): string => {
  const folder = mkdtempSync(join(tmpdir(), 'skysheaf-'));
  folders.push(folder);
  return join(folder, 'db.sqlite');
};
afterEach(() => {
  for (const folder of folders.splice(0)) rmSync(folder, { recursive: true });
});

/** What MikroORM generates on SQLite for a changed column: a new table, a copy, a drop, a rename. */
class RebuildMissions extends Migration {
  override up(): void {
    this.addSql('pragma foreign_keys = off;');
    this.addSql('create table `missions__temp_alter` as select * from `missions`;');
    this.addSql('drop table `missions`;');
    this.addSql('alter table `missions__temp_alter` rename to `missions`;');
    this.addSql('create unique index `missions_id_unique` on `missions` (`id`);');
  }
}

const count = async (orm: MikroORM, table: string): Promise<number> => {
  const [row] = await orm.em
    .getConnection()
    .execute<{ n: number }[]>(`select count(*) as n from ${table}`);
  return row?.n ?? -1;
};

const fill = async (orm: MikroORM): Promise<void> => {
  const connection = orm.em.getConnection();
  await connection.execute(
    `insert into missions (id, name, code, series, priority) values ('m1', 'Alder', 'ALD', 1, 1)`,
  );
  for (const id of ['r1', 'r2'])
    await connection.execute(
      `insert into requirements (id, mission_id, applies_to, what, minimum_duration_seconds, uplink)
       values (?, 'm1', 'each', 'contacts', 60, 'none')`,
      [id],
    );
};

const withRebuild = async (file: string): Promise<MikroORM> => {
  const options = ormOptions(file);
  return MikroORM.init({
    ...options,
    migrations: {
      ...options.migrations,
      migrationsList: [...migrationsList, { name: 'RebuildMissions', class: RebuildMissions }],
    },
  });
};

describe('migrations', () => {
  it('agree with the entities', async () => {
    const orm = await openDatabase(':memory:');
    await migrate(orm);
    expect(await orm.migrator.checkMigrationNeeded()).toBe(false);
    await orm.close(true);
  });

  it('keep the child rows when a parent table is rebuilt', async () => {
    const file = newFile();
    const first = await openDatabase(file);
    await migrate(first);
    await fill(first);
    await first.close(true);
    const second = await withRebuild(file);
    await migrate(second);
    expect(await count(second, 'missions')).toBe(1);
    expect(await count(second, 'requirements')).toBe(2);
    await second.close(true);
  });

  it('would lose them without the guard: the test above can fail', async () => {
    const file = newFile();
    const first = await openDatabase(file);
    await migrate(first);
    await fill(first);
    await first.close(true);
    const second = await withRebuild(file);
    await second.migrator.up();
    expect(await count(second, 'requirements')).toBe(0);
    await second.close(true);
  });
});

describe('the database', () => {
  it('is synced at every commit, keeps foreign keys and a write-ahead log', async () => {
    const orm = await openDatabase(newFile());
    const connection = orm.em.getConnection();
    const pragma = async (name: string) =>
      Object.values((await connection.execute<object[]>(`pragma ${name}`))[0] ?? {})[0] as unknown;
    expect(await pragma('journal_mode')).toBe('wal');
    expect(await pragma('synchronous')).toBe(2);
    expect(await pragma('foreign_keys')).toBe(1);
    expect(await pragma('locking_mode')).toBe('exclusive');
    await orm.close(true);
  });
});
