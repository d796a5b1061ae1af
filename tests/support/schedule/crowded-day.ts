import { makeFacts } from '../../../shared/schedule/facts/make-facts.ts';
import type { ContactModel, DayModel, Facts } from '../../../shared/schedule/model.ts';
import { roundInward } from '../../../shared/time.ts';
import { inventedDay } from './invented-day.ts';
import { contactOf } from './plan-builder.ts';
import { pick, seededRandom } from './random.ts';

type Random = () => number;
const some = <T>(random: Random, items: readonly T[]): T | null =>
  items[Math.floor(random() * items.length)] ?? null;

/** A small day with a bit of everything: mask, sector, tilted faces, closures, few channels, one frequency for many. */
export function crowdedDay(seed: number): { day: DayModel; facts: Facts; random: Random } {
  const random = seededRandom(seed);
  const day = inventedDay({
    seed,
    satellites: 6 + Math.floor(8 * random()),
    missions: 3,
    faces: 1 + Math.floor(3 * random()),
    receiveChannels: 2 + Math.floor(3 * random()),
    transmitChannels: 1 + Math.floor(2 * random()),
    hours: [0, 6],
  });
  if (random() < 0.5)
    day.station.horizonMask = [
      { azimuthDeg: 0, elevationDeg: 7 },
      { azimuthDeg: 90, elevationDeg: 16 },
      { azimuthDeg: 200, elevationDeg: 5 },
    ];
  if (random() < 0.5)
    day.station.keepOutSectors = [
      {
        label: 'road',
        azimuthFromDeg: 60,
        azimuthToDeg: 130,
        elevationFromDeg: 0,
        elevationToDeg: 40,
      },
    ];
  for (const face of day.faces) face.transmitBeamLimit = pick(random, [1, 2]);
  if (random() < 0.6) for (const { downlink } of day.satellites) downlink.frequencyMhz = 2245;
  const [channel, face] = [some(random, day.channels), some(random, day.faces)];
  const fromMs = day.day.fromMs + Math.floor(5 * random()) * 3_600_000;
  const closure = { direction: 'both' as const, fromMs, reducedByDb: null, reason: 'works' };
  if (channel)
    day.closures.push({
      ...closure,
      id: 'c1',
      scope: 'channel',
      scopeId: channel.id,
      toMs: fromMs + 2_700_000,
    });
  if (face && random() < 0.5)
    day.closures.push({
      ...closure,
      id: 'c2',
      scope: 'face',
      scopeId: face.id,
      direction: 'transmit',
      toMs: null,
    });
  return { day, facts: makeFacts(day), random };
}

/** A contact of a random pass on random channels, over a random part of a window or a little beyond it. */
export function randomContact(
  { day, facts, random }: { day: DayModel; facts: Facts; random: Random },
  id: string,
): ContactModel | null {
  const window = some(
    random,
    facts.windows.filter(({ direction }) => direction === 'receive'),
  );
  const pass = day.passes.find((one) => one.id === window?.passId);
  const whole = window && roundInward(window);
  if (!window || !whole || !pass) return null;
  const onFace = (direction: 'receive' | 'transmit') =>
    some(
      random,
      day.channels.filter((one) => one.faceId === window.faceId && one.direction === direction),
    );
  const shift = (): number => 1000 * pick(random, [0, 0, 0, 30, 60, 90, -5, -30]);
  const receive = { fromMs: whole.fromMs + shift(), toMs: whole.toMs - shift() };
  const uplinks = facts.windows.filter(
    (one) => one.passId === pass.id && one.faceId === window.faceId && one.direction === 'transmit',
  );
  const uplink = some(random, uplinks);
  const inside = uplink && roundInward(uplink);
  const [downChannel, upChannel] = [onFace('receive'), onFace('transmit')];
  if (!downChannel || receive.fromMs >= receive.toMs) return null;
  const transmit =
    inside && upChannel && random() < 0.7
      ? { channelId: upChannel.id, fromMs: inside.fromMs + shift(), toMs: inside.toMs - shift() }
      : null;
  return contactOf(day, pass, {
    id,
    receive: { channelId: downChannel.id, ...receive },
    transmit: transmit && transmit.fromMs < transmit.toMs ? transmit : null,
    faceId: window.faceId,
  });
}
