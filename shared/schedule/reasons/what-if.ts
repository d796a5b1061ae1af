import { satelliteName, faceLabel, missionName, type PlanContext } from '../context.ts';
import type {
  ChannelModel,
  ClosureModel,
  ContactModel,
  DayModel,
  PassModel,
  SatelliteModel,
} from '../model.ts';
import { planLegs } from '../plan-legs.ts';
import { fitsBand, radioFor } from '../radio-fit.ts';
import { closedPlace } from '../rules/closure.ts';
import { clockSpan, decimals } from '../words.ts';
import { placeWords, type Freeing } from './freeing.ts';
import { holdsTogether, type Nearby } from './nearby.ts';
import { placeContact } from './placement.ts';

/** The same day with something changed in thought. */
const withDay = (context: PlanContext, change: Partial<DayModel>): PlanContext => {
  const day = { ...context.day, ...change };
  return {
    ...context,
    day,
    channels: new Map(day.channels.map((channel) => [channel.id, channel])),
    faces: new Map(day.faces.map((face) => [face.id, face])),
  };
};

/** Where the pass would stand in the changed world; null where it still would not. */
function placedIn(changed: PlanContext, near: Nearby, pass: PassModel): ContactModel | null {
  const placed = placeContact(changed, { pass, legs: planLegs(changed, near.contacts) });
  return placed && holdsTogether(changed, [...near.contacts, placed]) ? placed : null;
}

const wish = (kind: Freeing['kind'], words: string): Freeing => ({
  kind,
  words,
  costMinutes: 0,
  edits: [],
});

/** A channel like those of the face that fits the radio whatever it needs. */
function thoughtChannel(
  satellite: SatelliteModel,
  faceId: string,
  direction: ChannelModel['direction'],
  like: ChannelModel | undefined,
): ChannelModel {
  return {
    id: `one more ${direction}`,
    faceId,
    label: `one more ${direction} channel`,
    direction,
    polarisation: 'both',
    bandwidthKhz: radioFor(satellite, direction)?.bandwidthKhz ?? 0,
    setUpSeconds: like?.setUpSeconds ?? 0,
    tearDownSeconds: like?.tearDownSeconds ?? 0,
    inService: true,
  };
}

function oneMoreChannel(near: Nearby, pass: PassModel, satellite: SatelliteModel): Freeing[] {
  const { context } = near;
  return context.day.faces.flatMap((face) =>
    (['receive', 'transmit'] as const).flatMap((direction) => {
      const radio = radioFor(satellite, direction);
      if (!radio || !fitsBand(face, direction, radio)) return [];
      const like = context.day.channels.find(
        (one) => one.faceId === face.id && one.direction === direction,
      );
      const more = thoughtChannel(satellite, face.id, direction, like);
      const placed = placedIn(
        withDay(context, { channels: [...context.day.channels, more] }),
        near,
        pass,
      );
      const leg = placed && (direction === 'receive' ? placed.receive : placed.transmit);
      if (!leg || leg.channelId !== more.id) return [];
      return [
        wish(
          'channel',
          `One more ${direction} channel on ${face.label} from ${clockSpan(leg)} would free it.`,
        ),
      ];
    }),
  );
}

function oneMoreBeam(near: Nearby, pass: PassModel, faceIds: ReadonlySet<string>): Freeing[] {
  const { context } = near;
  return context.day.faces
    .filter(({ id }) => faceIds.has(id))
    .flatMap((face) => {
      const raised = { ...face, transmitBeamLimit: face.transmitBeamLimit + 1 };
      const faces = context.day.faces.map((one) => (one === face ? raised : one));
      const placed = placedIn(withDay(context, { faces }), near, pass);
      if (!placed?.transmit) return [];
      return [
        wish(
          'transmit-beam',
          `One more transmit beam on ${face.label} (${raised.transmitBeamLimit} instead of ${face.transmitBeamLimit}) from ${clockSpan(placed.transmit)} would free it.`,
        ),
      ];
    });
}

function closureEnded(near: Nearby, pass: PassModel, closures: readonly ClosureModel[]): Freeing[] {
  const { context } = near;
  return closures.flatMap((closure) => {
    const open = context.day.closures.filter(({ id }) => id !== closure.id);
    const placed = placedIn(withDay(context, { closures: open }), near, pass);
    if (!placed) return [];
    return [
      wish(
        'closure',
        `Without the closure of ${closedPlace(context, closure).replace(/^(The|Channel)/, (word) => word.toLowerCase())} (${closure.reason}) it fits ${placeWords(context, placed)}.`,
      ),
    ];
  });
}

/** A mission may accept less separation among its own satellites. */
function lessSeparation(near: Nearby, pass: PassModel, others: readonly ContactModel[]): Freeing[] {
  const { context } = near;
  return others
    .filter(({ missionId }) => missionId === pass.missionId)
    .flatMap((other) => {
      const isTheirs = (ids: readonly string[]): boolean =>
        ids.includes(other.passId) && ids.includes(pass.id);
      const accepted = context.facts.conflicts.filter(({ passIds }) => isTheirs(passIds));
      const [worst] = accepted.toSorted((a, b) => a.separationHpbw - b.separationHpbw);
      const changed: PlanContext = {
        ...context,
        conflictsOf: (passId, faceId, direction) =>
          context
            .conflictsOf(passId, faceId, direction)
            .filter(({ passIds }) => !isTheirs(passIds)),
      };
      const placed = worst && placedIn(changed, near, pass);
      if (!placed || !worst) return [];
      return [
        wish(
          'separation',
          `If ${missionName(context, pass.missionId)} accepts ${decimals(worst.separationHpbw, 2)} half-power beamwidths between its own ${satelliteName(context, pass.satelliteId)} and ${satelliteName(context, other.satelliteId)} on ${faceLabel(context, worst.faceId)}, it fits ${placeWords(context, placed)}.`,
        ),
      ];
    });
}

export interface Standing {
  /** Faces whose transmit beams are all on. */
  fullFaces: ReadonlySet<string>;
  closures: readonly ClosureModel[];
  /** Contacts whose beams are too close. */
  tooClose: readonly ContactModel[];
}

/** Changes of the station or of what is accepted, each alone, that would let the pass on. */
export function whatIf(
  near: Nearby,
  pass: PassModel,
  satellite: SatelliteModel,
  standing: Standing,
): Freeing[] {
  return [
    ...lessSeparation(near, pass, standing.tooClose),
    ...closureEnded(near, pass, standing.closures),
    ...oneMoreBeam(near, pass, standing.fullFaces),
    ...oneMoreChannel(near, pass, satellite),
  ];
}
