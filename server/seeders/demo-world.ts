import type { CreateChannel } from '../../shared/schemas/channel.ts';
import type { CreateFace } from '../../shared/schemas/face.ts';
import type { CreateMission } from '../../shared/schemas/mission.ts';
import type { CreateRequirement } from '../../shared/schemas/requirement.ts';
import type { CreateSatellite } from '../../shared/schemas/satellite.ts';
import type { Role } from '../../shared/schemas/session.ts';
import type { CreateStation } from '../../shared/schemas/station.ts';

/** The demo's invented world. People, places, missions and satellites resemble none that exist. */

export type DemoPerson = 'operator' | 'scheduler' | 'lead' | 'lead2' | 'admin';

export const PEOPLE: Record<
  DemoPerson,
  { label: string; name: string; email: string; roles: Role[] }
> = {
  operator: {
    label: 'Operator',
    name: 'Tove Halmrast',
    email: 'operator@skysheaf.example',
    roles: ['operator'],
  },
  scheduler: {
    label: 'Scheduler',
    name: 'Mara Eklind',
    email: 'scheduler@skysheaf.example',
    roles: ['scheduler'],
  },
  lead: {
    label: 'Mission lead',
    name: 'Adaeze Lindqvist',
    email: 'lead@skysheaf.example',
    roles: ['lead'],
  },
  lead2: {
    label: 'Second mission lead',
    name: 'Ruben Okonjo',
    email: 'lead2@skysheaf.example',
    roles: ['lead'],
  },
  admin: {
    label: 'Administrator',
    name: 'Ilse Varga',
    email: 'admin@skysheaf.example',
    roles: ['administrator'],
  },
};

type DemoChannel = Omit<CreateChannel, 'faceId'>;
type DemoFace = Omit<CreateFace, 'stationId'> & { channels: DemoChannel[] };
type DemoStation = CreateStation & { faces: DemoFace[] };

const channel = (
  label: string,
  direction: DemoChannel['direction'],
  polarisation: DemoChannel['polarisation'],
): DemoChannel => ({
  label,
  direction,
  polarisation,
  bandwidthKhz: 5000,
  setUpSeconds: 30,
  tearDownSeconds: 10,
  inService: true,
});

const TAYLOR = { kind: 'taylor', sidelobeDb: -25, nBar: 4 } as const;

/** The S-band face of REFERENCE section 7, station A. */
const SBAND: Omit<DemoFace, 'label' | 'channels'> = {
  boresightAzimuthDeg: 0,
  boresightElevationDeg: 50,
  rollDeg: 0,
  elementsX: 24,
  elementsY: 24,
  pitchXMm: 68,
  pitchYMm: 68,
  receiveTaper: TAYLOR,
  transmitTaper: { kind: 'uniform' },
  scanLossExponent: 1.2,
  scanLossTable: null,
  normalLimitDb: 3.6,
  hardEndDb: 4.4,
  architecture: 'digital',
  receiveBandMhz: [2200, 2290],
  transmitBandMhz: [2025, 2110],
  transmitBeamLimit: 2,
  requiredIsolationDb: 20,
  sidelobeFloorDb: -40,
  radio: {
    radiationEfficiency: 0.9,
    antennaNoiseK: 40,
    feedLossDb: 0.4,
    lnaNoiseFigureDb: 1,
    lnaGainDb: 30,
    dividerWays: 1,
    dividerExcessDb: 0,
    secondNoiseFigureDb: 0,
    wattsPerElement: 0.5,
    transmitLossDb: 0.3,
    outputBackOffDb: 3,
    otherLossDb: 0.7,
  },
};

const mask = (...knots: [number, number][]) =>
  knots.map(([azimuthDeg, elevationDeg]) => ({ azimuthDeg, elevationDeg }));

export const STATIONS: DemoStation[] = [
  {
    name: 'Station A, Storvall',
    latitudeDeg: 65.1,
    longitudeDeg: 22.4,
    heightM: 200,
    timeZone: 'Europe/Stockholm',
    horizonMask: mask([0, 3], [40, 4], [75, 6.5], [110, 5], [180, 4], [230, 5.5], [300, 3.5]),
    receiveElevationFloorDeg: 5,
    transmitElevationFloorDeg: 5,
    keepOutSectors: [
      {
        label: 'Village road',
        azimuthFromDeg: 60,
        azimuthToDeg: 85,
        elevationFromDeg: 0,
        elevationToDeg: 12,
      },
    ],
    guardTimeSeconds: 5,
    freezeTimeSeconds: 900,
    signOffCutOffMinutes: 360,
    ut1MinusUtcSeconds: 0,
    faces: [
      {
        ...SBAND,
        label: 'North face',
        channels: [
          channel('R1', 'receive', 'rhcp'),
          channel('R2', 'receive', 'rhcp'),
          channel('R3', 'receive', 'rhcp'),
          channel('R4', 'receive', 'rhcp'),
          channel('R5', 'receive', 'lhcp'),
          channel('R6', 'receive', 'lhcp'),
          channel('T1', 'transmit', 'both'),
          channel('T2', 'transmit', 'both'),
        ],
      },
    ],
  },
  {
    name: 'Station B, Nordkap field',
    latitudeDeg: 70.3,
    longitudeDeg: 27.2,
    heightM: 300,
    timeZone: 'Europe/Oslo',
    horizonMask: mask([0, 4], [180, 6]),
    receiveElevationFloorDeg: 5,
    transmitElevationFloorDeg: 10,
    keepOutSectors: [],
    guardTimeSeconds: 5,
    freezeTimeSeconds: 900,
    signOffCutOffMinutes: 360,
    ut1MinusUtcSeconds: 0,
    faces: [
      {
        ...SBAND,
        label: 'X-band face',
        boresightElevationDeg: 45,
        elementsX: 64,
        elementsY: 64,
        pitchXMm: 17.8,
        pitchYMm: 17.8,
        scanLossExponent: 1.3,
        normalLimitDb: 3.9,
        hardEndDb: 4.5,
        architecture: 'hybrid',
        receiveBandMhz: [8025, 8400],
        transmitBandMhz: null,
        transmitBeamLimit: 0,
        radio: {
          ...SBAND.radio,
          radiationEfficiency: 0.85,
          antennaNoiseK: 50,
          feedLossDb: 0.3,
          lnaNoiseFigureDb: 1.6,
          lnaGainDb: 25,
          dividerWays: 4,
          dividerExcessDb: 1,
          secondNoiseFigureDb: 6,
          wattsPerElement: 0,
        },
        channels: ['X1', 'X2', 'X3', 'X4'].map((label) => ({
          ...channel(label, 'receive', 'both'),
          bandwidthKhz: 80_000,
          setUpSeconds: 60,
          tearDownSeconds: 15,
        })),
      },
    ],
  },
  {
    name: 'Station C, Karrooberg',
    latitudeDeg: -31.4,
    longitudeDeg: 24.1,
    heightM: 1200,
    timeZone: 'Africa/Johannesburg',
    horizonMask: mask([0, 5]),
    receiveElevationFloorDeg: 5,
    transmitElevationFloorDeg: 10,
    keepOutSectors: [],
    guardTimeSeconds: 5,
    freezeTimeSeconds: 900,
    signOffCutOffMinutes: 360,
    ut1MinusUtcSeconds: 0,
    faces: [45, 135, 225, 315].map((boresightAzimuthDeg, index) => ({
      ...SBAND,
      label: `Face ${index + 1}`,
      boresightAzimuthDeg,
      boresightElevationDeg: 38,
      elementsX: 16,
      elementsY: 16,
      normalLimitDb: 2.9,
      hardEndDb: 3.4,
      radio: { ...SBAND.radio, antennaNoiseK: 55, wattsPerElement: 1 },
      channels: [
        channel(`F${index + 1}R1`, 'receive', 'both'),
        channel(`F${index + 1}R2`, 'receive', 'both'),
        channel(`F${index + 1}R3`, 'receive', 'both'),
        channel(`F${index + 1}T1`, 'transmit', 'both'),
      ],
    })),
  },
];

type DemoMission = Omit<CreateMission, 'leadIds'> & {
  leads: ('lead' | 'lead2')[];
  requirements: Omit<CreateRequirement, 'missionId'>[];
};
type DemoLine = DemoMission['requirements'][number];

const line = (wish: Partial<DemoLine> & Pick<DemoLine, 'what'>): DemoLine => ({
  appliesTo: 'each',
  stationId: null,
  least: null,
  most: null,
  minimumDurationSeconds: 180,
  uplink: 'none',
  leastUplinkMinutes: null,
  minimumElevationDeg: null,
  marginFloorDb: null,
  hoursUtc: null,
  weekdays: null,
  scanLossLimitDb: null,
  ...wish,
});

export const MISSIONS: DemoMission[] = [
  {
    name: 'Quern',
    code: 'QRN',
    series: 1,
    priority: 3,
    leads: ['lead2'],
    requirements: [
      line({ what: 'contacts', least: 4, minimumDurationSeconds: 180, uplink: 'wanted' }),
      line({ what: 'minutes', appliesTo: 'together', least: 120, uplink: 'wanted' }),
    ],
  },
  {
    name: 'Osket',
    code: 'OSK',
    series: 2,
    priority: 2,
    leads: ['lead2'],
    requirements: [
      line({ what: 'contacts', least: 2 }),
      line({ what: 'minutes', appliesTo: 'together', least: 110 }),
    ],
  },
  {
    name: 'Hollin',
    code: 'HLN',
    series: 3,
    priority: 1,
    leads: ['lead'],
    requirements: [
      line({ what: 'contacts', least: 4, uplink: 'required', leastUplinkMinutes: 2 }),
      line({ what: 'gap', most: 720, uplink: 'required', leastUplinkMinutes: 2 }),
    ],
  },
  {
    name: 'Tavisk',
    code: 'TVK',
    series: 4,
    priority: 2,
    leads: ['lead', 'lead2'],
    requirements: [
      line({
        what: 'contacts',
        appliesTo: 'together',
        least: 6,
        minimumDurationSeconds: 120,
        uplink: 'required',
        leastUplinkMinutes: 2,
      }),
    ],
  },
  {
    name: 'Brindle',
    code: 'BRD',
    series: 5,
    priority: 4,
    leads: ['lead'],
    requirements: [line({ what: 'contacts', appliesTo: 'together', least: 4, uplink: 'wanted' })],
  },
];

type DemoSatellite = Omit<CreateSatellite, 'missionId'> & { missionCode: string };

interface Kind {
  missionCode: string;
  name: string;
  count: number;
  firstNumber: number;
  downlinkMhz: number;
  polarisation: 'rhcp' | 'lhcp';
  hasUplink: boolean;
}

const KINDS: Kind[] = [
  {
    missionCode: 'QRN',
    name: 'Quern',
    count: 4,
    firstNumber: 91001,
    downlinkMhz: 2215,
    polarisation: 'lhcp',
    hasUplink: true,
  },
  {
    missionCode: 'OSK',
    name: 'Osket',
    count: 9,
    firstNumber: 91005,
    downlinkMhz: 2262,
    polarisation: 'rhcp',
    hasUplink: false,
  },
  {
    missionCode: 'HLN',
    name: 'Hollin',
    count: 3,
    firstNumber: 91014,
    downlinkMhz: 2245,
    polarisation: 'rhcp',
    hasUplink: true,
  },
  {
    missionCode: 'TVK',
    name: 'Tavisk',
    count: 6,
    firstNumber: 91017,
    downlinkMhz: 2230,
    polarisation: 'rhcp',
    hasUplink: true,
  },
  {
    missionCode: 'BRD',
    name: 'Brindle',
    count: 2,
    firstNumber: 91023,
    downlinkMhz: 2275,
    polarisation: 'lhcp',
    hasUplink: true,
  },
];

const satellite = (kind: Kind, index: number): DemoSatellite => ({
  missionCode: kind.missionCode,
  name: `${kind.name} ${index + 1}`,
  catalogNumber: kind.firstNumber + index,
  downlink: {
    frequencyMhz: kind.downlinkMhz,
    bandwidthKhz: 2000,
    polarisation: kind.polarisation,
    eirpDbw: -1,
    rateKbps: 1000,
    requiredEbN0Db: 3.5,
  },
  uplink: kind.hasUplink
    ? {
        frequencyMhz: 2067.5,
        bandwidthKhz: 200,
        polarisation: kind.polarisation,
        gOverTDbK: -28,
        rateKbps: 64,
        requiredEbN0Db: 9.6,
      }
    : null,
  transmitsAlways: false,
  requiredCOverIDb: null,
  guardTimeSeconds: null,
  timeUncertaintySeconds: 0,
});

/** 24 satellites; the numbers are those of tle/demo.tle. */
export const FLEET: DemoSatellite[] = KINDS.flatMap((kind) =>
  Array.from({ length: kind.count }, (_, index) => satellite(kind, index)),
);
