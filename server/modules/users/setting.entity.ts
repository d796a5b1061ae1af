import { defineEntity, p, type InferEntity } from '@mikro-orm/core';

/** Facts about the database itself, such as when and as what it was seeded. */
export const Setting = defineEntity({
  name: 'Setting',
  tableName: 'settings',
  properties: {
    key: p.string().primary(),
    value: p.json().$type<Record<string, unknown>>(),
  },
});
export type Setting = InferEntity<typeof Setting>;
