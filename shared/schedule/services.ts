import { intersect, MINUTE_MS, SECOND_MS } from '../time.ts';
import type { ContactModel, DayModel, PassModel, UplinkNeed } from './model.ts';

/** What one contact of a pass must at least be to serve somebody. */
export interface Service {
  minimumMs: number;
  uplink: UplinkNeed;
  /** Least length of a required transmit leg, ms. */
  leastUplinkMs: number;
}

/** Requirement lines of a mission that ask something of this station. */
export const linesAt = (day: DayModel, missionId: string): DayModel['requirements'] =>
  day.requirements.filter(
    (line) =>
      line.missionId === missionId &&
      (line.stationId === null || line.stationId === day.station.id),
  );

/**
 * The services a contact of a pass may serve: the requirement lines of its mission and the requests that name it. A
 * contact is long enough when it serves one of them. Without any, everything of at least a second serves.
 */
export function servicesOf(day: DayModel, pass: PassModel): Service[] {
  const lines = linesAt(day, pass.missionId);
  const shortestMs = Math.min(...lines.map((line) => line.minimumDurationSeconds * SECOND_MS));
  const minimumMs = Number.isFinite(shortestMs) ? Math.max(SECOND_MS, shortestMs) : SECOND_MS;
  const asked = day.requests.filter(
    (request) =>
      request.satelliteId === pass.satelliteId &&
      ((request.kind === 'pass' && request.passId === pass.id) ||
        (request.kind === 'minutes' && intersect(request, pass) !== null)),
  );
  const services = [
    ...lines.map((line) => ({
      minimumMs: Math.max(SECOND_MS, line.minimumDurationSeconds * SECOND_MS),
      uplink: line.uplink,
      leastUplinkMs:
        line.uplink === 'required'
          ? Math.max(SECOND_MS, (line.leastUplinkMinutes ?? 0) * MINUTE_MS)
          : 0,
    })),
    ...asked.map(({ uplink }) => ({
      minimumMs,
      uplink,
      leastUplinkMs: uplink === 'required' ? SECOND_MS : 0,
    })),
  ];
  return services.length > 0 ? services : [{ minimumMs, uplink: 'wanted', leastUplinkMs: 0 }];
}

/** How much a contact lacks of a service, ms of downlink and of uplink. */
export function lacking(
  contact: Pick<ContactModel, 'receive' | 'transmit'>,
  service: Service,
): { receiveMs: number; transmitMs: number } {
  const receive = contact.receive.toMs - contact.receive.fromMs;
  const transmit = contact.transmit ? contact.transmit.toMs - contact.transmit.fromMs : 0;
  return {
    receiveMs: Math.max(0, service.minimumMs - receive),
    transmitMs: Math.max(0, service.leastUplinkMs - transmit),
  };
}
