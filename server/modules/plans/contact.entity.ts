import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import { Pass, Prediction } from '../passes/pass.entity.ts';
import { Satellite } from '../satellites/satellite.entity.ts';
import { Channel } from '../stations/channel.entity.ts';
import { Face } from '../stations/face.entity.ts';
import { DayPlan } from './plan.entity.ts';

/** A contact's identity over all revisions: its log, calendar UID and history hang on it. */
export const Contact = defineEntity({
  name: 'Contact',
  tableName: 'contacts',
  properties: {
    id: p.uuid().primary(),
    pass: () => p.manyToOne(Pass),
    satellite: () => p.manyToOne(Satellite),
    emergency: p.boolean().default(false),
    createdMs: p.integer(),
  },
});
export type Contact = InferEntity<typeof Contact>;

/** A contact in one revision: a receive leg and, when the service needs it, a transmit leg. */
export const PlannedContact = defineEntity({
  name: 'PlannedContact',
  tableName: 'planned_contacts',
  uniques: [{ properties: ['plan', 'contact'] }],
  properties: {
    id: p.uuid().primary(),
    plan: () => p.manyToOne(DayPlan).deleteRule('cascade'),
    contact: () => p.manyToOne(Contact).index(),
    /** The prediction that the times were planned on; drift is measured from it. */
    prediction: () => p.manyToOne(Prediction),
    face: () => p.manyToOne(Face),
    receiveChannel: () => p.manyToOne(Channel),
    receiveFromMs: p.integer().index(),
    receiveToMs: p.integer(),
    transmitChannel: () => p.manyToOne(Channel).nullable(),
    transmitFromMs: p.integer().nullable(),
    transmitToMs: p.integer().nullable(),
    locked: p.boolean().default(false),
    note: p.text().default(''),
  },
});
export type PlannedContact = InferEntity<typeof PlannedContact>;

/** How a contact went. */
export const ContactLogRow = defineEntity({
  name: 'ContactLogRow',
  tableName: 'contact_logs',
  properties: {
    id: p.uuid().primary(),
    contact: () => p.manyToOne(Contact).unique(),
    outcome: p.string().$type<'served' | 'partly' | 'lost' | 'not-attempted'>(),
    cause: p.text(),
    minutes: p.float().nullable(),
    volumeMbit: p.float().nullable(),
    note: p.text(),
    byName: p.string(),
    atMs: p.integer(),
  },
});
export type ContactLogRow = InferEntity<typeof ContactLogRow>;
