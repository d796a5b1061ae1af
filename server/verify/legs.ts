import type {
  ChannelModel,
  ContactModel,
  DayModel,
  Direction,
  FaceModel,
  LegModel,
  PassModel,
  SatelliteModel,
} from '../../shared/schedule/model.ts';

/** One leg with everything it names; contacts of the neighbouring days are partners, not suspects. */
export interface Suspect {
  contact: ContactModel;
  leg: LegModel;
  direction: Direction;
  own: boolean;
  pass: PassModel | undefined;
  satellite: SatelliteModel | undefined;
  face: FaceModel | undefined;
  channel: ChannelModel | undefined;
  name: string;
}

export function suspects(day: DayModel, contacts: readonly ContactModel[]): Suspect[] {
  const ownIds = new Set(contacts.map(({ id }) => id));
  const others = day.neighbours.filter(({ id }) => !ownIds.has(id));
  const find = <T extends { id: string }>(items: readonly T[], id: string): T | undefined =>
    items.find((item) => item.id === id);
  const legsOf = (contact: ContactModel, own: boolean): Suspect[] => {
    const satellite = find(day.satellites, contact.satelliteId);
    const shared = {
      contact,
      own,
      satellite,
      pass: find(day.passes, contact.passId),
      face: find(day.faces, contact.faceId),
      name: satellite?.name ?? 'an unknown satellite',
    };
    const legs: [Direction, LegModel | null][] = [
      ['receive', contact.receive],
      ['transmit', contact.transmit],
    ];
    return legs.flatMap(([direction, leg]) =>
      leg ? [{ ...shared, direction, leg, channel: find(day.channels, leg.channelId) }] : [],
    );
  };
  return [
    ...contacts.flatMap((contact) => legsOf(contact, true)),
    ...others.flatMap((contact) => legsOf(contact, false)),
  ];
}

const at = (ms: number): string => new Date(ms).toISOString().slice(11, 19);

/** `the downlink of Teal 3, 06:10:00 to 06:18:00`. */
export const described = ({ name, direction, leg }: Suspect): string =>
  `the ${direction === 'receive' ? 'downlink' : 'uplink'} of ${name}, ${at(leg.fromMs)} to ${at(leg.toMs)}`;
