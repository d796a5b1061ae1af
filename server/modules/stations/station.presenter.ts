import type {
  Channel as ChannelAnswer,
  Closure as ClosureAnswer,
} from '../../../shared/schemas/channel.ts';
import type { Face as FaceAnswer } from '../../../shared/schemas/face.ts';
import type { Station as StationAnswer } from '../../../shared/schemas/station.ts';
import { toIso } from '../../../shared/time.ts';
import type { Channel } from './channel.entity.ts';
import type { Closure } from './closure.entity.ts';
import type { Face } from './face.entity.ts';
import type { Station } from './station.entity.ts';

export const presentStation = (station: Station, inhibit: Closure | null): StationAnswer => ({
  id: station.id,
  version: station.version,
  name: station.name,
  latitudeDeg: station.latitudeDeg,
  longitudeDeg: station.longitudeDeg,
  heightM: station.heightM,
  timeZone: station.timeZone,
  horizonMask: station.horizonMask,
  receiveElevationFloorDeg: station.receiveElevationFloorDeg,
  transmitElevationFloorDeg: station.transmitElevationFloorDeg,
  keepOutSectors: station.keepOutSectors,
  guardTimeSeconds: station.guardTimeSeconds,
  freezeTimeSeconds: station.freezeTimeSeconds,
  signOffCutOffMinutes: station.signOffCutOffMinutes,
  ut1MinusUtcSeconds: station.ut1MinusUtcSeconds,
  transmitInhibit: inhibit && {
    sinceUtc: toIso(inhibit.fromMs),
    by: inhibit.createdByName,
    reason: inhibit.reason,
    closureId: inhibit.id,
  },
});

export const presentFace = (face: Face): FaceAnswer => ({
  id: face.id,
  version: face.version,
  stationId: face.station.id,
  label: face.label,
  boresightAzimuthDeg: face.boresightAzimuthDeg,
  boresightElevationDeg: face.boresightElevationDeg,
  rollDeg: face.rollDeg,
  elementsX: face.elementsX,
  elementsY: face.elementsY,
  pitchXMm: face.pitchXMm,
  pitchYMm: face.pitchYMm,
  receiveTaper: face.receiveTaper,
  transmitTaper: face.transmitTaper,
  scanLossExponent: face.scanLossExponent,
  scanLossTable: face.scanLossTable ?? null,
  normalLimitDb: face.normalLimitDb,
  hardEndDb: face.hardEndDb,
  architecture: face.architecture,
  receiveBandMhz: face.receiveBandMhz,
  transmitBandMhz: face.transmitBandMhz ?? null,
  transmitBeamLimit: face.transmitBeamLimit,
  requiredIsolationDb: face.requiredIsolationDb,
  sidelobeFloorDb: face.sidelobeFloorDb,
  radio: face.radio,
});

export const presentChannel = (channel: Channel): ChannelAnswer => ({
  id: channel.id,
  version: channel.version,
  faceId: channel.face.id,
  label: channel.label,
  direction: channel.direction,
  polarisation: channel.polarisation,
  bandwidthKhz: channel.bandwidthKhz,
  setUpSeconds: channel.setUpSeconds,
  tearDownSeconds: channel.tearDownSeconds,
  inService: channel.inService,
});

export const presentClosure = (closure: Closure): ClosureAnswer => ({
  id: closure.id,
  version: closure.version,
  stationId: closure.station.id,
  scope: closure.scope,
  scopeId: closure.scopeId,
  direction: closure.direction,
  fromUtc: toIso(closure.fromMs),
  toUtc: closure.toMs == null ? null : toIso(closure.toMs),
  reducedByDb: closure.reducedByDb ?? null,
  reason: closure.reason,
  inhibit: closure.inhibit,
  createdBy: closure.createdByName,
  endedUtc: closure.endedMs == null ? null : toIso(closure.endedMs),
});
