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
  /** The contact of the current plan that this option leaves as it is. */
  keeps: ContactModel | null;
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
  const base = { pass, faceId, receive, uplinkWanted, keeps: null };
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

/** The option that leaves a contact of the current plan exactly as it is; null when it cannot stay so. */
export function optionKeeping(
  setting: OptionSetting,
  contact: ContactModel,
  guardMs: number,
): Option | null {
  const { context, fixed, groups } = setting;
  const pass = context.passes.get(contact.passId);
  const satellite = pass && context.satellites.get(pass.satelliteId);
  if (!pass || !satellite) return null;
  const legOn = (
    leg: ContactModel['receive'],
    direction: ChannelGroup['direction'],
    overhangMs: number,
  ): OptionLeg | null => {
    const radio = radioFor(satellite, direction);
    const group = groups.find(({ channels }) => channels.some(({ id }) => id === leg.channelId));
    if (!group || !radio || group.direction !== direction || group.faceId !== contact.faceId)
      return null;
    if (!group.channels.some((channel) => fitsChannel(channel, radio))) return null;
    const inside = context.windowsOf(pass.id, contact.faceId, direction).some((window) => {
      const span = { fromMs: window.fromMs - overhangMs, toMs: window.toMs + overhangMs };
      const question = { group, pass, satellite, span };
      return openPieces(context, fixed, question).some((piece) => contains(piece, leg));
    });
    return inside ? { group, fromMs: leg.fromMs, toMs: leg.toMs } : null;
  };
  const receive = legOn(contact.receive, 'receive', guardMs);
  const transmit = contact.transmit && legOn(contact.transmit, 'transmit', 0);
  if (!receive || (contact.transmit && !transmit)) return null;
  if (transmit && !contains(receive, transmit)) return null;
  const services = servicesOf(context.day, pass);
  if (!serves(services, receive, transmit)) return null;
  const uplinkWanted = services.some(({ uplink }) => uplink !== 'none');
  return { pass, faceId: contact.faceId, receive, transmit, uplinkWanted, keeps: contact };
}
