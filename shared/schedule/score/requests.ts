import { intersect, MINUTE_MS } from '../../time.ts';
import { totalMs, union } from '../intervals.ts';
import type { ContactModel, DayModel, RequestModel } from '../model.ts';
import { decimals } from '../words.ts';

export interface RequestResult {
  requestId: string;
  missionId: string;
  satelliteId: string;
  met: boolean;
  /** Minutes given; null for a request of no contact. */
  givenMinutes: number | null;
  note: string | null;
}

const usable = (request: RequestModel, contact: ContactModel): boolean =>
  request.uplink !== 'required' || contact.transmit !== null;

function judge(request: RequestModel, contacts: readonly ContactModel[]): RequestResult {
  const { id: requestId, missionId, satelliteId } = request;
  const key = { requestId, missionId, satelliteId };
  const own = contacts.filter((contact) => contact.satelliteId === satelliteId);
  const during = union(own.flatMap(({ receive }) => intersect(receive, request) ?? []));
  if (request.kind === 'none') {
    const met = during.length === 0;
    return { ...key, met, givenMinutes: null, note: met ? null : 'a contact lies in it' };
  }
  const serving = own.filter((contact) => usable(request, contact));
  if (request.kind === 'pass') {
    const contact = serving.find(({ passId }) => passId === request.passId);
    const givenMinutes = contact ? (contact.receive.toMs - contact.receive.fromMs) / MINUTE_MS : 0;
    return { ...key, met: contact !== undefined, givenMinutes, note: null };
  }
  const parts = serving.flatMap(({ receive }) => intersect(receive, request) ?? []);
  const givenMinutes = totalMs(union(parts)) / MINUTE_MS;
  const met = givenMinutes >= (request.minutes ?? 0);
  const note = met ? null : `${decimals(givenMinutes, 1)} of ${request.minutes ?? 0} min`;
  return { ...key, met, givenMinutes, note };
}

/** Which requests that touch the day are met by the plan and the neighbouring days' contacts. */
export function judgeRequests(day: DayModel, contacts: readonly ContactModel[]): RequestResult[] {
  const ids = new Set(contacts.map(({ id }) => id));
  const all = [...contacts, ...day.neighbours.filter(({ id }) => !ids.has(id))];
  return day.requests
    .filter((request) => intersect(request, day.day) !== null)
    .map((request) => judge(request, all));
}
