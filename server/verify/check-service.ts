import type { ContactModel, DayModel, Violation } from '../../shared/schedule/model.ts';
import { finding } from './finding.ts';
import type { Suspect } from './legs.ts';

/** A contact serves a line of its mission or a request for it; without any of them any contact of a second does. */
function serves(day: DayModel, { contact, pass }: Suspect): boolean {
  const receiveS = (contact.receive.toMs - contact.receive.fromMs) / 1000;
  const transmitS = contact.transmit ? (contact.transmit.toMs - contact.transmit.fromMs) / 1000 : 0;
  const lines = day.requirements.filter(
    (line) =>
      line.missionId === contact.missionId &&
      (line.stationId === null || line.stationId === day.station.id),
  );
  const byLine = lines.some((line) => {
    const uplinkS =
      line.uplink === 'required' ? Math.max(1, 60 * (line.leastUplinkMinutes ?? 0)) : 0;
    return receiveS >= Math.max(1, line.minimumDurationSeconds) && transmitS >= uplinkS;
  });
  const shortestS =
    lines.length > 0 ? Math.min(...lines.map((line) => line.minimumDurationSeconds)) : 1;
  const requests = day.requests.filter(
    (request) =>
      request.satelliteId === contact.satelliteId &&
      (request.kind === 'pass'
        ? request.passId === contact.passId
        : request.kind === 'minutes' &&
          pass &&
          pass.fromMs < request.toMs &&
          request.fromMs < pass.toMs),
  );
  const byRequest = requests.some(
    ({ uplink }) =>
      receiveS >= Math.max(1, shortestS) && transmitS >= (uplink === 'required' ? 1 : 0),
  );
  const asked = lines.length > 0 || requests.length > 0;
  return byLine || byRequest || (!asked && receiveS >= 1);
}

const overlap = (a: ContactModel, b: ContactModel): boolean =>
  a.receive.fromMs < b.receive.toMs && b.receive.fromMs < a.receive.toMs;

/** Contacts long enough for somebody, and one at a time for each satellite. */
export function checkService(day: DayModel, suspects: readonly Suspect[]): Violation[] {
  const downlinks = suspects.filter(({ direction }) => direction === 'receive');
  const found: Violation[] = [];
  for (const [index, one] of downlinks.entries()) {
    const { contact, leg } = one;
    const emptyUplink =
      contact.transmit !== null && contact.transmit.toMs <= contact.transmit.fromMs;
    if (one.own && one.pass && (!serves(day, one) || emptyUplink))
      found.push(finding('too-short', 'too short for its service', [one], leg.fromMs, leg.toMs));
    for (const other of downlinks.slice(index + 1))
      if (
        (one.own || other.own) &&
        other.contact.satelliteId === contact.satelliteId &&
        overlap(contact, other.contact)
      )
        found.push(
          finding('duplicate', 'two contacts at once', [one, other], leg.fromMs, leg.toMs),
        );
  }
  return found;
}
