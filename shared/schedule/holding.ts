import { SECOND_MS, type Interval } from '../time.ts';
import type { ChannelModel, LegModel, SatelliteModel, StationModel } from './model.ts';

/** How far a receive leg may overhang its usable window, ms. */
export const guardMs = (station: StationModel, satellite: SatelliteModel): number =>
  (satellite.guardTimeSeconds ?? station.guardTimeSeconds) * SECOND_MS;

/**
 * What a leg takes of its channel: set-up before, tear-down after, and for a receive leg the time uncertainty of the
 * satellite at both ends (the channel is held, nothing is transmitted there).
 */
export function holding(
  leg: Pick<LegModel, 'fromMs' | 'toMs'>,
  channel: ChannelModel,
  satellite: SatelliteModel | undefined,
): Interval {
  const uncertainMs =
    channel.direction === 'receive' ? (satellite?.timeUncertaintySeconds ?? 0) * SECOND_MS : 0;
  return {
    fromMs: leg.fromMs - uncertainMs - channel.setUpSeconds * SECOND_MS,
    toMs: leg.toMs + uncertainMs + channel.tearDownSeconds * SECOND_MS,
  };
}
