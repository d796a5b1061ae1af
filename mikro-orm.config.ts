import { Migrator } from '@mikro-orm/migrations';
import { defineConfig, type Options } from '@mikro-orm/sqlite';
import { entities } from './server/entities.ts';
import { migrationsList } from './server/migrations/list.ts';

interface RawConnection {
  exec(sql: string, done: (error: Error | null) => void): void;
}

/**
 * One connection (transactions are serialised), write-ahead log, synced at every commit, foreign keys on.
 * The lock is exclusive: a second process is refused instead of sharing the file.
 */
const PRAGMAS = [
  'PRAGMA busy_timeout = 2000',
  'PRAGMA locking_mode = EXCLUSIVE',
  'PRAGMA journal_mode = WAL',
  'PRAGMA synchronous = FULL',
  'PRAGMA foreign_keys = ON',
].join('; ');

export const ormOptions = (file: string): Options =>
  defineConfig({
    dbName: file,
    entities,
    extensions: [Migrator],
    // The list is explicit, so that it survives bundling; a snapshot file would be written into the sources.
    migrations: { migrationsList, snapshot: false, path: './server/migrations', emit: 'ts' },
    pool: {
      min: 1,
      max: 1,
      afterCreate: (connection: RawConnection, done: (error: Error | null, c: unknown) => void) =>
        connection.exec(PRAGMAS, (error) => done(error, connection)),
    },
    discovery: { warnWhenNoEntities: false },
    logger: () => {},
  });

export default ormOptions(process.env.DATABASE_FILE ?? './data/skysheaf.sqlite');
