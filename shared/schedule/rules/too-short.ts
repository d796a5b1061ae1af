import { SECOND_MS } from '../../time.ts';
import { satelliteName, type PlanContext } from '../context.ts';
import type { ContactModel, Violation } from '../model.ts';
import { lacking, servicesOf, type Service } from '../services.ts';
import { clock, spoken } from '../words.ts';

/** The service the contact comes nearest to. */
function nearestService(services: readonly Service[], contact: ContactModel): Service | undefined {
  const total = (service: Service): number => {
    const { receiveMs, transmitMs } = lacking(contact, service);
    return receiveMs + transmitMs;
  };
  return services.toSorted((a, b) => total(a) - total(b))[0];
}

function sentence(name: string, contact: ContactModel, service: Service): string {
  const { receiveMs } = lacking(contact, service);
  const { receive, transmit } = contact;
  if (receiveMs > 0)
    return `The downlink of ${name} at ${clock(receive.fromMs)} lasts ${spoken(receive.toMs - receive.fromMs)}; its service needs at least ${spoken(service.minimumMs)}.`;
  if (!transmit)
    return `The contact of ${name} at ${clock(receive.fromMs)} has no uplink; its service requires one of at least ${spoken(service.leastUplinkMs)}.`;
  return `The uplink of ${name} at ${clock(transmit.fromMs)} lasts ${spoken(transmit.toMs - transmit.fromMs)}; its service needs at least ${spoken(service.leastUplinkMs)}.`;
}

function judgeContact(context: PlanContext, contact: ContactModel): Violation[] {
  const pass = context.passes.get(contact.passId);
  if (!pass) return [];
  const service = nearestService(servicesOf(context.day, pass), contact);
  const { receive, transmit } = contact;
  const emptyUplink = transmit !== null && transmit.toMs <= transmit.fromMs;
  if (!service) return [];
  const { receiveMs, transmitMs } = lacking(contact, service);
  if (receiveMs + transmitMs === 0 && !emptyUplink) return [];
  const ofUplink = receiveMs === 0;
  const leg = ofUplink ? transmit : receive;
  return [
    {
      rule: 'too-short',
      message: sentence(satelliteName(context, contact.satelliteId), contact, service),
      contactIds: [contact.id],
      fromMs: receive.fromMs,
      toMs: receive.toMs,
      value: leg ? (leg.toMs - leg.fromMs) / SECOND_MS : 0,
      limit:
        (ofUplink ? Math.max(SECOND_MS, service.leastUplinkMs) : service.minimumMs) / SECOND_MS,
      unit: 's',
    },
  ];
}

/** Receive leg and required transmit leg are not shorter than the service's minimum. */
export const judgeTooShort = (
  context: PlanContext,
  contacts: readonly ContactModel[],
): Violation[] => contacts.flatMap((contact) => judgeContact(context, contact));
