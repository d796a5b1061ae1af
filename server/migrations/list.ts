import type { MigrationObject } from '@mikro-orm/core';
import { Migration20261201125005 } from './Migration20261201125005.ts';

/** Every migration in its order; the name is stored in the database. Add each new one by hand. */
export const migrationsList: MigrationObject[] = [
  { name: 'Migration20261201125005', class: Migration20261201125005 },
];
