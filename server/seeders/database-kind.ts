import type { MikroORM } from '@mikro-orm/sqlite';
import { Setting } from '../modules/users/setting.entity.ts';
import { User } from '../modules/users/user.entity.ts';

export type DatabaseKind = 'empty' | 'half-seeded' | 'demo' | 'real';

/** Empty, a demo whose seeding was cut off, the demo, or somebody's work. */
export const databaseKind = async (orm: MikroORM): Promise<DatabaseKind> => {
  const em = orm.em.fork();
  if (await em.findOne(Setting, { key: 'demo' })) return 'demo';
  if (await em.findOne(Setting, { key: 'seeding' })) return 'half-seeded';
  return (await em.count(User)) > 0 ? 'real' : 'empty';
};
