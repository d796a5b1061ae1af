import type { ContactModel, PassModel } from '../../../shared/schedule/model.ts';
import { lacking, servicesOf, type Service } from '../../../shared/schedule/services.ts';
import { contains, intersect, MINUTE_MS, type Interval } from '../../../shared/time.ts';
import type { ChannelGroup } from './channel-groups.ts';
import type { Contention } from './contention.ts';
import { margins, openPieces } from './open-pieces.ts';
import { groupsFor, type CompileSetting, type PassPieces, type Piece } from './pass-pieces.ts';
import { variants } from './variants.ts';

export interface OptionLeg extends Interval {
  group: ChannelGroup;
}

/** One way to serve a pass: a leg on a group of channels and, where there is one, the uplink inside it. */
export interface Option {
  pass: PassModel;
  faceId: string;
  receive: OptionLeg;
  transmit: OptionLeg | null;
  uplinkWanted: boolean;
  /** The contact of the current plan whose times and face this option keeps. */
  keeps: ContactModel | null;
  /** It keeps the channels as well, as far as they can be told apart. */
  sameChannels: boolean;
}

/** How the pieces of a pass are cut. */
export interface Cutting {
  contentionOf: (pieces: PassPieces, piece: Piece) => Contention;
  /** Step of the hand-over instants; null: whole pieces only. */
  gridMs: number | null;
}

/** Uplinks are shorter and their ends matter less: they are cut on a coarser grid, never finer than this. */
const UPLINK_GRID_MS = 2 * MINUTE_MS;
/** An uplink below this is no use to anybody who only wants one. */
const LEAST_UPLINK_MS = MINUTE_MS;

const serves = (
  services: readonly Service[],
  receive: Interval,
  transmit: Interval | null,
): boolean => {
  const legs = {
    receive: { channelId: '', ...receive },
    transmit: transmit && { channelId: '', ...transmit },
  };
  return services.some((service) => {
    const { receiveMs, transmitMs } = lacking(legs, service);
    return receiveMs + transmitMs === 0;
  });
};

/** Uplinks of a downlink on its face: the longest a group leaves, and shorter ones where uplinks contend. */
function uplinksWithin(pieces: PassPieces, cutting: Cutting, receive: OptionLeg): OptionLeg[] {
  const { services, satellite } = pieces;
  const leastMs = Math.min(
    ...services.map(({ leastUplinkMs }) => leastUplinkMs || LEAST_UPLINK_MS),
  );
  return pieces.transmit
    .filter(({ group }) => group.faceId === receive.group.faceId)
    .flatMap((piece) => {
      const inside = intersect(piece, receive);
      if (!inside) return [];
      const { group } = piece;
      const whole = { group, ...inside };
      const minimumMs = Math.min(leastMs, inside.toMs - inside.fromMs);
      const gridMs = cutting.gridMs && Math.max(UPLINK_GRID_MS, 2 * cutting.gridMs);
      const contention = cutting.contentionOf(pieces, whole);
      const question = {
        piece: inside,
        minimumMs,
        contention,
        margins: margins(group, satellite),
        gridMs,
      };
      return variants(question).map((way) => ({ group, ...way }));
    });
}

function optionsOfReceive(pieces: PassPieces, cutting: Cutting, receive: OptionLeg): Option[] {
  const { pass, services, uplinkWanted } = pieces;
  const { faceId } = receive.group;
  const base = { pass, faceId, receive, uplinkWanted, keeps: null, sameChannels: false };
  const transmits: (OptionLeg | null)[] = [null, ...uplinksWithin(pieces, cutting, receive)];
  return transmits
    .filter((transmit) => serves(services, receive, transmit))
    .map((transmit) => ({ ...base, transmit }));
}

/** About how many options a pass will have; counted without making them. */
export function countOptions(pieces: PassPieces, cutting: Cutting): number {
  const { minimumMs } = pieces;
  return pieces.receive.reduce((sum, piece) => {
    const contention = cutting.contentionOf(pieces, piece);
    const leg = margins(piece.group, pieces.satellite);
    const { gridMs } = cutting;
    const downlinks = variants({ piece, minimumMs, contention, margins: leg, gridMs }).length;
    return sum + downlinks * (1 + uplinksWithin(pieces, cutting, piece).length);
  }, 0);
}

/** Every option of a pass beside the fixed plan. */
export const optionsOfPass = (pieces: PassPieces, cutting: Cutting): Option[] =>
  pieces.receive.flatMap((piece) => {
    const { group } = piece;
    const contention = cutting.contentionOf(pieces, piece);
    const { minimumMs } = pieces;
    const leg = margins(group, pieces.satellite);
    return variants({ piece, minimumMs, contention, margins: leg, gridMs: cutting.gridMs }).flatMap(
      (way) => optionsOfReceive(pieces, cutting, { group, ...way }),
    );
  });

/** Groups on which a leg of a current contact could stay at its times; a receive leg may overhang by the guard time. */
function placesFor(
  setting: CompileSetting,
  contact: ContactModel,
  direction: ChannelGroup['direction'],
  overhangMs: number,
): OptionLeg[] {
  const { context, fixed } = setting;
  const leg = direction === 'receive' ? contact.receive : contact.transmit;
  const pass = context.passes.get(contact.passId);
  const satellite = pass && context.satellites.get(pass.satelliteId);
  if (!leg || !pass || !satellite) return [];
  return groupsFor(setting, contact.faceId, direction, satellite).flatMap((group) => {
    const inside = context.windowsOf(pass.id, contact.faceId, direction).some((window) => {
      const span = { fromMs: window.fromMs - overhangMs, toMs: window.toMs + overhangMs };
      const question = { group, pass, satellite, span };
      return openPieces(context, fixed, question).some((piece) => contains(piece, leg));
    });
    return inside ? [{ group, fromMs: leg.fromMs, toMs: leg.toMs }] : [];
  });
}

const holds = ({ group }: OptionLeg, channelId: string | undefined): boolean =>
  group.channels.some(({ id }) => id === channelId);

/** Options that leave a contact of the current plan at its times on its face; empty when it cannot stay so. */
export function optionsKeeping(
  setting: CompileSetting,
  contact: ContactModel,
  guardMs: number,
): Option[] {
  const { receive: downlink, transmit: uplink, faceId } = contact;
  const pass = setting.context.passes.get(contact.passId);
  if (!pass) return [];
  const services = servicesOf(setting.context.day, pass);
  if (!serves(services, downlink, uplink) || (uplink && !contains(downlink, uplink))) return [];
  const uplinkWanted = services.some((service) => service.uplink !== 'none');
  const uplinks = uplink ? placesFor(setting, contact, 'transmit', 0) : [null];
  return placesFor(setting, contact, 'receive', guardMs).flatMap((receive) =>
    uplinks.map((transmit) => {
      const same =
        holds(receive, downlink.channelId) && (!transmit || holds(transmit, uplink?.channelId));
      return { pass, faceId, receive, transmit, uplinkWanted, keeps: contact, sameChannels: same };
    }),
  );
}
