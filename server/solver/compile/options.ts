import type { PlanContext } from '../../../shared/schedule/context.ts';
import type { ContactModel, PassModel, SatelliteModel } from '../../../shared/schedule/model.ts';
import { fitsChannel, radioFor } from '../../../shared/schedule/radio-fit.ts';
import { lacking, servicesOf, type Service } from '../../../shared/schedule/services.ts';
import { contains, intersect, type Interval } from '../../../shared/time.ts';
import type { ChannelGroup } from './channel-groups.ts';
import type { FixedPlan } from './fixed-plan.ts';
import { openPieces } from './open-pieces.ts';
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

export interface OptionSetting {
  context: PlanContext;
  fixed: FixedPlan;
  groups: readonly ChannelGroup[];
  /** Step of the trimmed variants; null: whole pieces only. */
  gridMs: number | null;
  /** Ways to use a piece; replaced by finer ones near a known plan. */
  variantsOf?: (
    pass: PassModel,
    group: ChannelGroup,
    piece: Interval,
    minimumMs: number,
  ) => Interval[];
}

const groupsFor = (
  { groups }: OptionSetting,
  faceId: string,
  direction: ChannelGroup['direction'],
  satellite: SatelliteModel,
): ChannelGroup[] => {
  const radio = radioFor(satellite, direction);
  return groups.filter(
    (group) =>
      group.faceId === faceId &&
      group.direction === direction &&
      radio !== null &&
      group.channels.some((channel) => fitsChannel(channel, radio)),
  );
};

/** The longest uplink that each fitting group leaves inside a downlink. */
function uplinksWithin(
  setting: OptionSetting,
  pass: PassModel,
  satellite: SatelliteModel,
  faceId: string,
  receive: Interval,
): OptionLeg[] {
  const windows = setting.context.windowsOf(pass.id, faceId, 'transmit');
  return groupsFor(setting, faceId, 'transmit', satellite).flatMap((group) => {
    const pieces = windows
      .flatMap((window) => intersect(window, receive) ?? [])
      .flatMap((span) =>
        openPieces(setting.context, setting.fixed, { group, pass, satellite, span }),
      );
    const longest = pieces.toSorted((a, b) => b.toMs - b.fromMs - (a.toMs - a.fromMs))[0];
    return longest ? [{ group, ...longest }] : [];
  });
}

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

function optionsOfReceive(
  setting: OptionSetting,
  pass: PassModel,
  satellite: SatelliteModel,
  services: readonly Service[],
  receive: OptionLeg,
): Option[] {
  const { faceId } = receive.group;
  const uplinkWanted = services.some(({ uplink }) => uplink !== 'none');
  const base = { pass, faceId, receive, uplinkWanted, keeps: null, sameChannels: false };
  const uplinks = uplinkWanted ? uplinksWithin(setting, pass, satellite, faceId, receive) : [];
  const transmits: (OptionLeg | null)[] = [null, ...uplinks];
  return transmits
    .filter((transmit) => serves(services, receive, transmit))
    .map((transmit) => ({ ...base, transmit }));
}

/** Legs may begin from here on: contacts belong to the day in which they begin. */
function plannable({ day }: PlanContext, piece: Interval): Interval | null {
  if (piece.fromMs >= day.day.toMs) return null;
  const fromMs = Math.max(piece.fromMs, day.day.fromMs);
  return fromMs < piece.toMs ? { fromMs, toMs: piece.toMs } : null;
}

/** Every option of a pass beside the fixed plan. */
export function optionsOfPass(setting: OptionSetting, pass: PassModel): Option[] {
  const { context, fixed } = setting;
  const satellite = context.satellites.get(pass.satelliteId);
  if (!satellite) return [];
  const services = servicesOf(context.day, pass);
  const minimumMs = Math.min(...services.map((service) => service.minimumMs));
  const waysOf =
    setting.variantsOf ?? ((_pass, _group, piece, least) => variants(piece, least, setting.gridMs));
  return context.day.faces.flatMap((face) =>
    context.windowsOf(pass.id, face.id, 'receive').flatMap((span) =>
      groupsFor(setting, face.id, 'receive', satellite).flatMap((group) =>
        openPieces(context, fixed, { group, pass, satellite, span })
          .flatMap((piece) => plannable(context, piece) ?? [])
          .flatMap((piece) => waysOf(pass, group, piece, minimumMs))
          .flatMap((way) =>
            optionsOfReceive(setting, pass, satellite, services, { group, ...way }),
          ),
      ),
    ),
  );
}

/** Groups on which a leg of a current contact could stay at its times; a receive leg may overhang by the guard time. */
function placesFor(
  setting: OptionSetting,
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
  setting: OptionSetting,
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
