import { mkdirSync } from 'node:fs';
import { dirname, resolve } from 'node:path';
import { MikroORM } from '@mikro-orm/sqlite';
import { ormOptions } from '../mikro-orm.config.ts';
import { StartError } from './env.ts';

export const isLocked = (error: unknown): boolean =>
  error instanceof Error && /SQLITE_BUSY|database is locked/i.test(error.message);

/** Opens the database file, alone: a second process is refused (`locking_mode = EXCLUSIVE`). */
export const openDatabase = async (file: string): Promise<MikroORM> => {
  if (file !== ':memory:') mkdirSync(dirname(resolve(file)), { recursive: true });
  try {
    const orm = await MikroORM.init(ormOptions(file));
    await orm.em.getConnection().execute('select count(*) from sqlite_master');
    return orm;
  } catch (error) {
    if (isLocked(error))
      throw new StartError(
        `The database ${file} is in use by another process. Stop that one first.`,
      );
    throw error;
  }
};

/**
 * Runs the pending migrations. On SQLite a changed column is a new table, a copy and a drop; foreign keys
 * must be off meanwhile, or the drop deletes the child rows by their ON DELETE CASCADE. The pragma has no
 * effect inside a transaction, so it is set around it, and every key is checked afterwards.
 */
export const migrate = async (orm: MikroORM): Promise<void> => {
  const connection = orm.em.getConnection();
  await connection.execute('pragma foreign_keys = off');
  try {
    await orm.migrator.up();
    const broken = await connection.execute<unknown[]>('pragma foreign_key_check');
    if (broken.length > 0)
      throw new StartError(`The migration left ${broken.length} rows whose parent is missing.`);
  } finally {
    await connection.execute('pragma foreign_keys = on');
  }
};

/** Throws everything away and builds the tables anew; only ever for a demo whose seeding was cut off. */
export const empty = async (orm: MikroORM): Promise<void> => {
  const connection = orm.em.getConnection();
  await connection.execute('pragma foreign_keys = off');
  await orm.schema.dropSchema({ dropMigrationsTable: true });
  await migrate(orm);
};
