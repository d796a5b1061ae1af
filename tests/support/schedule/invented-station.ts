import type { ChannelModel, FaceModel, StationModel } from '../../../shared/schedule/model.ts';

/** Stations and faces after section 7 of the reference: invented, self-consistent. */
export function inventedStation(change: Partial<StationModel> = {}): StationModel {
  return {
    id: 'station',
    latitudeDeg: 52,
    longitudeDeg: 10,
    heightM: 100,
    ut1MinusUtcSeconds: 0,
    horizonMask: [],
    receiveElevationFloorDeg: 5,
    transmitElevationFloorDeg: 8,
    keepOutSectors: [],
    guardTimeSeconds: 10,
    freezeTimeSeconds: 900,
    ...change,
  };
}

export function inventedFace(id: string, change: Partial<FaceModel> = {}): FaceModel {
  return {
    id,
    stationId: 'station',
    label: `Face ${id}`,
    boresightAzimuthDeg: 0,
    boresightElevationDeg: 90,
    rollDeg: 0,
    elementsX: 24,
    elementsY: 24,
    pitchXMm: 68,
    pitchYMm: 68,
    receiveTaper: { kind: 'taylor', sidelobeDb: -25, nBar: 4 },
    transmitTaper: { kind: 'uniform' },
    scanLossExponent: 1.2,
    scanLossTable: null,
    normalLimitDb: 3.6,
    hardEndDb: 5,
    architecture: 'digital',
    receiveBandMhz: [2200, 2290],
    transmitBandMhz: [2025, 2110],
    transmitBeamLimit: 2,
    requiredIsolationDb: 20,
    sidelobeFloorDb: 38,
    radio: {
      radiationEfficiency: 0.9,
      antennaNoiseK: 40,
      feedLossDb: 0.4,
      lnaNoiseFigureDb: 1,
      lnaGainDb: 25,
      dividerWays: 1,
      dividerExcessDb: 0,
      secondNoiseFigureDb: 6,
      wattsPerElement: 0.5,
      transmitLossDb: 0.3,
      outputBackOffDb: 3,
      otherLossDb: 0.7,
    },
    ...change,
  };
}

export function inventedChannel(
  id: string,
  faceId: string,
  change: Partial<ChannelModel> = {},
): ChannelModel {
  return {
    id,
    faceId,
    label: id,
    direction: 'receive',
    polarisation: 'both',
    bandwidthKhz: 5000,
    setUpSeconds: 30,
    tearDownSeconds: 10,
    inService: true,
    ...change,
  };
}
