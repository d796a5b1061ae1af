import type { PlanContext } from '../../../shared/schedule/context.ts';
import type { PassModel, SatelliteModel } from '../../../shared/schedule/model.ts';
import { fitsChannel, radioFor } from '../../../shared/schedule/radio-fit.ts';
import { servicesOf, type Service } from '../../../shared/schedule/services.ts';
import { intersect, type Interval } from '../../../shared/time.ts';
import type { ChannelGroup } from './channel-groups.ts';
import type { FixedPlan } from './fixed-plan.ts';
import { openPieces } from './open-pieces.ts';

export interface CompileSetting {
  context: PlanContext;
  fixed: FixedPlan;
  groups: readonly ChannelGroup[];
}

/** A stretch of a window that is open on a group of channels, beside what stands. */
export interface Piece extends Interval {
  group: ChannelGroup;
}

/** Everything a pass could use, on all faces. */
export interface PassPieces {
  pass: PassModel;
  satellite: SatelliteModel;
  services: Service[];
  minimumMs: number;
  uplinkWanted: boolean;
  receive: Piece[];
  transmit: Piece[];
}

/** Groups of a face and direction with a channel that fits the satellite's radio. */
export function groupsFor(
  { groups }: CompileSetting,
  faceId: string,
  direction: ChannelGroup['direction'],
  satellite: SatelliteModel,
): ChannelGroup[] {
  const radio = radioFor(satellite, direction);
  return groups.filter(
    (group) =>
      group.faceId === faceId &&
      group.direction === direction &&
      radio !== null &&
      group.channels.some((channel) => fitsChannel(channel, radio)),
  );
}

/** The part in which a contact of the day may lie: it belongs to the day in which it begins. */
function plannable({ day }: PlanContext, piece: Interval): Interval | null {
  if (piece.fromMs >= day.day.toMs) return null;
  return intersect(piece, { fromMs: day.day.fromMs, toMs: Infinity });
}

function piecesIn(
  setting: CompileSetting,
  pass: PassModel,
  satellite: SatelliteModel,
  direction: ChannelGroup['direction'],
): Piece[] {
  const { context, fixed } = setting;
  return context.day.faces.flatMap((face) =>
    groupsFor(setting, face.id, direction, satellite).flatMap((group) =>
      context
        .windowsOf(pass.id, face.id, direction)
        .flatMap((span) => openPieces(context, fixed, { group, pass, satellite, span }))
        .flatMap((piece) => plannable(context, piece) ?? [])
        .map((piece) => ({ group, ...piece })),
    ),
  );
}

export function piecesOfPass(setting: CompileSetting, pass: PassModel): PassPieces | null {
  const { context } = setting;
  const satellite = context.satellites.get(pass.satelliteId);
  if (!satellite) return null;
  const services = servicesOf(context.day, pass);
  const minimumMs = Math.min(...services.map((service) => service.minimumMs));
  const uplinkWanted = services.some(({ uplink }) => uplink !== 'none');
  const receive = piecesIn(setting, pass, satellite, 'receive').filter(
    ({ fromMs, toMs }) => toMs - fromMs >= minimumMs,
  );
  const transmit = uplinkWanted ? piecesIn(setting, pass, satellite, 'transmit') : [];
  return { pass, satellite, services, minimumMs, uplinkWanted, receive, transmit };
}
