/** `npm run orm -- create | up | check`: migrations through the same guarded door as the server's start. */
import { readEnv } from '../env.ts';
import { migrate, openDatabase } from '../orm.ts';

const command = process.argv[2] ?? 'check';
const orm = await openDatabase(
  command === 'create' ? ':memory:' : readEnv(process.env).DATABASE_FILE,
);
if (command === 'up') {
  await migrate(orm);
  console.log('The database is migrated.');
} else if (command === 'create') {
  await migrate(orm);
  const made = await orm.migrator.createMigration('server/migrations');
  console.log(
    made.fileName ? `${made.fileName}: add it to server/migrations/list.ts` : 'Nothing differs.',
  );
} else if (command === 'check') {
  const needed = await orm.migrator.checkMigrationNeeded();
  console.log(needed ? 'The entities and the migrations differ.' : 'Nothing differs.');
  process.exitCode = needed ? 1 : 0;
} else {
  console.error('Say create, up or check.');
  process.exitCode = 2;
}
await orm.close(true);
