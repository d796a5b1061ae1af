/**
 * What the planner knows of the world: plain data, the same on both sides of the wire and in the workers.
 * Instants are ms UTC; legs are whole seconds; usable windows keep fractions of a millisecond.
 */
import type { Track } from '../orbit/track.ts';
import type { Interval } from '../time.ts';

export type Direction = 'receive' | 'transmit';
export type Polarisation = 'rhcp' | 'lhcp' | 'linear';

export interface MaskKnot {
  azimuthDeg: number;
  elevationDeg: number;
}

/** No transmission into it; azimuth runs clockwise from `azimuthFromDeg` to `azimuthToDeg` (may pass north). */
export interface KeepOutSector {
  label: string;
  azimuthFromDeg: number;
  azimuthToDeg: number;
  elevationFromDeg: number;
  elevationToDeg: number;
}

export interface StationModel {
  id: string;
  latitudeDeg: number;
  longitudeDeg: number;
  heightM: number;
  ut1MinusUtcSeconds: number;
  horizonMask: MaskKnot[];
  receiveElevationFloorDeg: number;
  transmitElevationFloorDeg: number;
  keepOutSectors: KeepOutSector[];
  guardTimeSeconds: number;
  freezeTimeSeconds: number;
}

export type Taper = { kind: 'uniform' } | { kind: 'taylor'; sidelobeDb: number; nBar: number };

export interface FaceModel {
  id: string;
  stationId: string;
  label: string;
  boresightAzimuthDeg: number;
  boresightElevationDeg: number;
  rollDeg: number;
  elementsX: number;
  elementsY: number;
  pitchXMm: number;
  pitchYMm: number;
  receiveTaper: Taper;
  transmitTaper: Taper;
  /** Exponent n of -10 n log10(cos theta); used where there is no table. */
  scanLossExponent: number;
  /** Measured rows [scan angle deg, loss dB], first row at 0; no extrapolation beyond the last. */
  scanLossTable: [number, number][] | null;
  normalLimitDb: number;
  hardEndDb: number;
  architecture: 'digital' | 'hybrid' | 'analog';
  receiveBandMhz: [number, number];
  transmitBandMhz: [number, number] | null;
  /** Transmit beams at one instant. */
  transmitBeamLimit: number;
  requiredIsolationDb: number;
  sidelobeFloorDb: number;
  radio: FaceRadio;
}

/** Noise and power data from which G/T and EIRP follow. */
export interface FaceRadio {
  radiationEfficiency: number;
  antennaNoiseK: number;
  feedLossDb: number;
  lnaNoiseFigureDb: number;
  lnaGainDb: number;
  dividerWays: number;
  dividerExcessDb: number;
  secondNoiseFigureDb: number;
  wattsPerElement: number;
  transmitLossDb: number;
  outputBackOffDb: number;
  otherLossDb: number;
}

export interface ChannelModel {
  id: string;
  faceId: string;
  label: string;
  direction: Direction;
  polarisation: Polarisation | 'both';
  bandwidthKhz: number;
  setUpSeconds: number;
  tearDownSeconds: number;
  inService: boolean;
}

export interface ClosureModel {
  id: string;
  scope: 'station' | 'face' | 'channel';
  scopeId: string;
  direction: Direction | 'both';
  fromMs: number;
  /** null: until further notice. */
  toMs: number | null;
  /** null: out of service; else the loss in dB that enters the link. */
  reducedByDb: number | null;
  reason: string;
}

export interface RadioLinkModel {
  frequencyMhz: number;
  bandwidthKhz: number;
  polarisation: Polarisation;
  rateKbps: number;
  requiredEbN0Db: number;
}

export interface SatelliteModel {
  id: string;
  missionId: string;
  name: string;
  downlink: RadioLinkModel & { eirpDbw: number };
  uplink: (RadioLinkModel & { gOverTDbK: number }) | null;
  transmitsAlways: boolean;
  requiredCOverIDb: number | null;
  guardTimeSeconds: number | null;
  timeUncertaintySeconds: number;
}

export interface MissionModel {
  id: string;
  name: string;
  /** 1 is the highest, 5 the lowest. */
  priority: number;
}

/** A pass with the prediction that is current for it. */
export interface PassModel extends Interval {
  id: string;
  predictionId: string;
  satelliteId: string;
  missionId: string;
  /** fromMs = AOS, toMs = LOS, exact. */
  tcaMs: number;
  maxElevationDeg: number;
  track: Track;
  /** Epoch of the element set; without it the link is planned as at its epoch. */
  elementEpochMs?: number;
}

export type UplinkNeed = 'required' | 'wanted' | 'none';

export interface RequirementModel {
  id: string;
  missionId: string;
  /** 'each': judged for every satellite of the mission; 'together': for all of them in sum. */
  appliesTo: 'each' | 'together';
  /** null: at all stations. */
  stationId: string | null;
  what: 'contacts' | 'minutes' | 'gap' | 'volume';
  /** Contacts, minutes or Mbit; for a gap the longest allowed gap, minutes, stands in `most`. */
  least: number | null;
  most: number | null;
  minimumDurationSeconds: number;
  uplink: UplinkNeed;
  leastUplinkMinutes: number | null;
  minimumElevationDeg: number | null;
  marginFloorDb: number | null;
  /** Hours of the UTC day [from, to); null: the whole day. May pass midnight. */
  hoursUtc: [number, number] | null;
  /** ISO weekdays 1-7; null: every day. */
  weekdays: number[] | null;
  scanLossLimitDb: number | null;
}

export interface RequestModel {
  id: string;
  missionId: string;
  satelliteId: string;
  /** 'pass': serve this pass; 'minutes': n minutes before the deadline; 'none': no contact in the interval. */
  kind: 'pass' | 'minutes' | 'none';
  passId: string | null;
  minutes: number | null;
  uplink: UplinkNeed;
  fromMs: number;
  toMs: number;
  priority: number;
}

export interface LegModel extends Interval {
  channelId: string;
}

export interface ContactModel {
  id: string;
  passId: string;
  predictionId: string;
  satelliteId: string;
  missionId: string;
  faceId: string;
  receive: LegModel;
  transmit: LegModel | null;
  locked: boolean;
}

/** Everything a day is planned from; `contacts` of the neighbouring days are fixed occupancy. */
export interface DayModel {
  station: StationModel;
  faces: FaceModel[];
  channels: ChannelModel[];
  closures: ClosureModel[];
  missions: MissionModel[];
  satellites: SatelliteModel[];
  requirements: RequirementModel[];
  requests: RequestModel[];
  /** Passes that touch the day (with those that touch its neighbours as far as contacts there refer to them). */
  passes: PassModel[];
  day: Interval;
  limitOfDayDb: number;
  neighbours: ContactModel[];
}

/** A part of a pass that one face can serve in one direction. Exact crossings. */
export interface UsableWindow extends Interval {
  passId: string;
  faceId: string;
  direction: Direction;
  minScanLossDb: number;
  maxScanLossDb: number;
  /** null until the link is computed for it. */
  minMarginDb: number | null;
}

/** While it lasts, the two passes must not both be served on that face in that direction. */
export interface ConflictInterval extends Interval {
  faceId: string;
  direction: Direction;
  passIds: [string, string];
  /** The pass that is disturbed most; which of the two at the worst instant. */
  victimPassId?: string;
  worstAtMs: number;
  /** Separation at the worst instant, in half-power beamwidths of the u-v plane. */
  separationHpbw: number;
  requiredHpbw: number;
  /** C/I of the victim at the worst instant, dB, and what it needs; null where only the separation is judged. */
  isolationDb: number | null;
  requiredDb: number | null;
}

/** A part of a pass that lies within the hard end of a face; nothing outside it may ever be used. */
export interface HardEndInterval extends Interval {
  passId: string;
  faceId: string;
  direction: Direction;
}

export interface Facts {
  windows: UsableWindow[];
  conflicts: ConflictInterval[];
  withinHardEnd: HardEndInterval[];
}

export const RULES = [
  'channel-busy',
  'outside-window',
  'channel-unfit',
  'beams-too-close',
  'transmit-limit',
  'closure',
  'too-short',
  'duplicate',
  'hard-end',
] as const;
export type Rule = (typeof RULES)[number];

export interface Violation extends Interval {
  rule: Rule;
  /** One sentence a person could read over the telephone, with the number. */
  message: string;
  contactIds: string[];
  value: number | null;
  limit: number | null;
  unit: string | null;
}

/** Warnings never refuse a hand edit. */
export interface Warning extends Interval {
  code: string;
  message: string;
  contactIds: string[];
}
