import { directionOnFace } from '../../../shared/array/face-geometry.ts';
import { scanLossDb } from '../../../shared/array/scan-loss.ts';
import { directionAt, lookAnglesAt } from '../../../shared/orbit/track.ts';
import { closuresOf } from '../../../shared/schedule/closures.ts';
import type { ContactModel, LegModel } from '../../../shared/schedule/model.ts';
import { DAY_MS, MINUTE_MS, SECOND_MS, toIso } from '../../../shared/time.ts';
import { toDegrees } from '../../../shared/units.ts';
import { reader, type Deps, type Person } from '../../deps.ts';
import { visibleTo } from '../../visible-to.ts';
import { contactsOf } from '../plans/day-model.ts';
import { toContactModel } from '../plans/contact-model.ts';
import type { PlannedContact } from '../plans/contact.entity.ts';
import { DayPlan } from '../plans/plan.entity.ts';
import type { PlanView } from '../plans/plan-read.service.ts';
import { Satellite } from '../satellites/satellite.entity.ts';
import { writeCalendar, type CalendarEvent } from './calendar-writer.ts';
import { number, text, writeCsv, type Cell } from './csv-writer.ts';

const ownContacts = (view: PlanView, person: Person): ContactModel[] => {
  const visible = visibleTo(person);
  return view.contacts.filter((contact) => visible.mission(contact.missionId));
};

const numbersOf = async (deps: Deps): Promise<Map<string, Satellite>> =>
  new Map((await reader(deps).find(Satellite, {})).map((one) => [one.id, one]));

const channelLabel = (view: PlanView, leg: LegModel | null): string =>
  (leg && view.world.context.channels.get(leg.channelId)?.label) ?? '';

const CONTACT_COLUMNS = [
  'contact_id',
  'object_name',
  'norad_cat_id',
  'mission',
  'station',
  'face',
  'receive_channel',
  'receive_from_utc',
  'receive_to_utc',
  'transmit_channel',
  'transmit_from_utc',
  'transmit_to_utc',
  'max_elevation_deg',
  'minutes',
  'locked',
  'note',
];

/** One row a contact; a lead gets those of own missions. */
export const contactsCsv = async (deps: Deps, view: PlanView, person: Person): Promise<string> => {
  const satellites = await numbersOf(deps);
  const { context, day } = view.world;
  const rows = ownContacts(view, person).map((contact): Cell[] => {
    const satellite = satellites.get(contact.satelliteId);
    const row = view.rows.find((one) => one.contact.id === contact.id);
    return [
      text(contact.id),
      text(satellite?.name ?? ''),
      text(String(satellite?.catalogNumber ?? '')),
      text(day.missions.find((one) => one.id === contact.missionId)?.name ?? ''),
      text(view.station.name),
      text(context.faces.get(contact.faceId)?.label ?? ''),
      text(channelLabel(view, contact.receive)),
      text(toIso(contact.receive.fromMs)),
      text(toIso(contact.receive.toMs)),
      text(channelLabel(view, contact.transmit)),
      text(contact.transmit ? toIso(contact.transmit.fromMs) : ''),
      text(contact.transmit ? toIso(contact.transmit.toMs) : ''),
      number(context.passes.get(contact.passId)?.maxElevationDeg ?? 0, 2),
      number((contact.receive.toMs - contact.receive.fromMs) / MINUTE_MS, 2),
      text(contact.locked ? 'yes' : 'no'),
      text(row?.note ?? ''),
    ];
  });
  return writeCsv(CONTACT_COLUMNS, rows);
};

const POINTING_COLUMNS = [
  'contact_id',
  'object_name',
  'norad_cat_id',
  'station',
  'beam_channel',
  'time_utc',
  'azimuth_deg',
  'elevation_deg',
  'range_km',
  'range_rate_km_s',
  'scan_angle_deg',
  'scan_loss_db',
  'transmit_channel',
  'element_set_id',
  'element_set_epoch_utc',
];

/** The transmit channel that may radiate at an instant: inside the leg, and nothing closes it (an inhibit, too). */
const radiating = (view: PlanView, contact: ContactModel, atMs: number): string => {
  const leg = contact.transmit;
  const channel = leg && view.world.context.channels.get(leg.channelId);
  if (!leg || !channel || atMs < leg.fromMs || atMs >= leg.toMs) return '';
  const isClosed = closuresOf(view.world.day, channel).some(
    (closure) => closure.fromMs <= atMs && atMs < closure.toMs,
  );
  return isClosed ? '' : channel.label;
};

/**
 * Pointing along each contact, from the element set in use at the moment of reading, which each row names. Geometric
 * elevation, no refraction.
 */
export const pointingCsv = async (
  deps: Deps,
  { view, person, stepSeconds }: { view: PlanView; person: Person; stepSeconds: number },
): Promise<string> => {
  const satellites = await numbersOf(deps);
  const rows = ownContacts(view, person).flatMap((contact): Cell[][] => {
    const pass = view.world.context.passes.get(contact.passId);
    const face = view.world.context.faces.get(contact.faceId);
    const satellite = satellites.get(contact.satelliteId);
    if (!pass || !face) return [];
    const source = view.world.sources.get(pass.predictionId);
    return instants(contact.receive, stepSeconds).map((atMs) => {
      const look = lookAnglesAt(pass.track, atMs);
      const { scanAngleRad } = directionOnFace(face, directionAt(pass.track, atMs));
      const loss = scanLossDb(face, scanAngleRad);
      return [
        text(contact.id),
        text(satellite?.name ?? ''),
        text(String(satellite?.catalogNumber ?? '')),
        text(view.station.name),
        text(channelLabel(view, contact.receive)),
        text(toIso(atMs)),
        number(look.azimuthDeg, 4),
        number(look.elevationDeg, 4),
        number(look.rangeKm, 3),
        number(look.rangeRateKmS, 4),
        number(toDegrees(scanAngleRad), 3),
        loss === null ? null : number(loss, 2),
        text(radiating(view, contact, atMs)),
        text(source?.elementSetId ?? ''),
        text(source ? toIso(source.epochMs) : ''),
      ];
    });
  });
  return writeCsv(POINTING_COLUMNS, rows);
};

const instants = ({ fromMs, toMs }: LegModel, stepSeconds: number): number[] => {
  const found: number[] = [];
  for (let atMs = fromMs; atMs < toMs; atMs += stepSeconds * SECOND_MS) found.push(atMs);
  return [...found, toMs];
};

/** Names are those of the domain, never of times or satellites, so an entry is updated and not doubled. */
const UID_DOMAIN = 'skysheaf.example';

const statusOf = (plan: DayPlan): CalendarEvent['status'] =>
  plan.state === 'draft' || plan.state === 'in-review' ? 'TENTATIVE' : 'CONFIRMED';

/** Calendar of a plan's contacts; contacts that earlier revisions had are cancelled, not left out. */
export const planCalendar = async (deps: Deps, view: PlanView, person: Person): Promise<string> => {
  const visible = visibleTo(person);
  const { plan } = view;
  const em = reader(deps);
  const earlier = await em.find(DayPlan, {
    station: plan.station.id,
    day: plan.day,
    revision: { $lt: plan.revision },
    state: { $in: ['released', 'superseded'] },
  });
  const present = new Set(view.rows.map((row) => row.contact.id));
  const gone = (
    await contactsOf(
      em,
      earlier.map((one) => one.id),
    )
  ).filter((row) => !present.has(row.contact.id));
  const lastGone = [...new Map(gone.map((row) => [row.contact.id, row])).values()];
  const event = (row: PlannedContact, status: CalendarEvent['status']): CalendarEvent =>
    calendarEvent(view, row, status);
  const events = [
    ...view.rows.map((row) => ({ row, status: statusOf(plan) })),
    ...lastGone.map((row) => ({ row, status: 'CANCELLED' as const })),
  ]
    .filter(({ row }) => visible.mission(row.contact.satellite.mission.id))
    .map(({ row, status }) => event(row, status));
  return writeCalendar(`Contacts, ${view.station.name}, ${plan.day}`, events);
};

const calendarEvent = (
  view: PlanView,
  row: PlannedContact,
  status: CalendarEvent['status'],
): CalendarEvent => {
  const contact = toContactModel(row);
  const pass = view.world.context.passes.get(contact.passId);
  const uplink = channelLabel(view, contact.transmit);
  return {
    uid: `contact-${contact.id}@${UID_DOMAIN}`,
    stampMs: view.plan.updatedMs,
    sequence: view.plan.revision - 1,
    fromMs: contact.receive.fromMs,
    toMs: contact.receive.toMs,
    status,
    summary: `${row.contact.satellite.name}, ${channelLabel(view, contact.receive)}${uplink ? ` and ${uplink}` : ''}`,
    description: `Plan of ${view.plan.day}, revision ${view.plan.revision}.${pass ? ` Highest ${pass.maxElevationDeg.toFixed(0)}°.` : ''}`,
    location: view.station.name,
  };
};

/** A file name that says what the pointing was made from. */
export const exportName = (view: PlanView, what: string, extension: string): string => {
  const station = view.station.name.replace(/[^A-Za-z0-9]+/g, '-').replace(/^-|-$/g, '');
  return `${what}_${station}_${view.plan.day}_r${view.plan.revision}.${extension}`;
};

/** The longest file of pointing: a day of contacts at one second would be millions of rows. */
export const SHORTEST_STEP_S = 1;
export const LONGEST_STEP_S = Math.round(DAY_MS / SECOND_MS / 24);
