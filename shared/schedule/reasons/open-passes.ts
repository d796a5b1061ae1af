import { overlaps } from '../../time.ts';
import { blockedIntervals, possibleIntervals, type Blocked } from '../blocked.ts';
import { planContext, type PlanContext } from '../context.ts';
import type { ContactModel, DayModel, Facts, PassModel, SatelliteModel } from '../model.ts';
import { assigning, placeWords, type Freeing } from './freeing.ts';
import { givingWay } from './give-way.ts';
import { nearby, type Nearby } from './nearby.ts';
import { whyNoWindow } from './no-window.ts';
import { placeContact } from './placement.ts';
import { raisedLimit } from './raise-limit.ts';
import { whatIf, type Standing } from './what-if.ts';
import { whyNot, type PassReason } from './why-not.ts';

/** A pass that is not on the plan: whether it could be, which rules stop it, and which single changes would free it. */
export interface OpenPassReasons {
  passId: string;
  /** `free`: it fits now; `stopped`: a rule stops it; `unusable`: no face has a usable window. */
  standing: 'free' | 'stopped' | 'unusable';
  reasons: PassReason[];
  /** Each tried out: with it no rule is broken. The gentlest first. */
  wouldFree: Freeing[];
}

/** What stands in the windows of a pass, over all channels that fit. */
function inTheWay(
  { context, legs }: Nearby,
  pass: PassModel,
  satellite: SatelliteModel,
): { channelFaceId: string; blocked: Blocked }[] {
  return context.day.channels.flatMap((channel) => {
    const candidate = { pass, satellite, channel };
    const windows = possibleIntervals(context, candidate, false);
    if (windows.length === 0) return [];
    return blockedIntervals(context, candidate, legs)
      .filter((one) => windows.some((window) => overlaps(window, one)))
      .map((blocked) => ({ channelFaceId: channel.faceId, blocked }));
  });
}

function standingOf(found: ReturnType<typeof inTheWay>): Standing {
  const closures = found.flatMap(({ blocked }) => blocked.closure ?? []);
  return {
    fullFaces: new Set(
      found
        .filter(({ blocked }) => blocked.rule === 'transmit-limit')
        .map(({ channelFaceId }) => channelFaceId),
    ),
    closures: [...new Set(closures)],
    tooClose: [
      ...new Set(
        found
          .filter(({ blocked }) => blocked.rule === 'beams-too-close')
          .flatMap(({ blocked }) => blocked.legs.map(({ contact }) => contact)),
      ),
    ],
  };
}

/** Contacts of this plan that stand in the way; those of the neighbouring days cannot give way here. */
function blockersOf(near: Nearby, found: ReturnType<typeof inTheWay>): ContactModel[] {
  const ids = new Set(
    found.flatMap(({ blocked }) => blocked.legs.map(({ contact }) => contact.id)),
  );
  return near.contacts.filter(({ id }) => ids.has(id));
}

function stopped(near: Nearby, pass: PassModel, satellite: SatelliteModel): OpenPassReasons {
  const found = inTheWay(near, pass, satellite);
  const giving = blockersOf(near, found).flatMap((blocker) => givingWay(near, pass, blocker) ?? []);
  const others = whatIf(near, pass, satellite, standingOf(found));
  const raised = raisedLimit(near, pass) ?? [];
  return {
    passId: pass.id,
    standing: 'stopped',
    reasons: whyNot(near.context, near.legs, pass, satellite),
    wouldFree: [...giving.toSorted((a, b) => a.costMinutes - b.costMinutes), ...others].concat(
      raised,
    ),
  };
}

function explain(
  context: PlanContext,
  contacts: readonly ContactModel[],
  pass: PassModel,
): OpenPassReasons[] {
  const satellite = context.satellites.get(pass.satelliteId);
  if (!satellite) return [];
  const near = nearby(context, contacts, pass);
  const placed = placeContact(near.context, { pass, legs: near.legs });
  if (placed) {
    const words = `It fits ${placeWords(context, placed)}.`;
    const free: Freeing = { kind: 'assign', words, costMinutes: 0, edits: assigning(placed) };
    return [{ passId: pass.id, standing: 'free', reasons: [], wouldFree: [free] }];
  }
  const seen = context.day.faces.some(
    (face) => context.windowsOf(pass.id, face.id, 'receive').length > 0,
  );
  if (seen) return [stopped(near, pass, satellite)];
  const raised = raisedLimit(near, pass);
  const reasons = whyNoWindow(context, pass, satellite);
  return [{ passId: pass.id, standing: 'unusable', reasons, wouldFree: raised ? [raised] : [] }];
}

/** Reasons for one open pass. */
export const explainPass = (
  context: PlanContext,
  contacts: readonly ContactModel[],
  passId: string,
): OpenPassReasons | null => {
  const pass = context.passes.get(passId);
  return (pass && explain(context, contacts, pass)[0]) ?? null;
};

/** Every pass of the day (by its AOS) that neither the plan nor a neighbouring day serves, with reasons. */
export function openPassesIn(
  context: PlanContext,
  contacts: readonly ContactModel[],
): OpenPassReasons[] {
  const served = new Set([...contacts, ...context.day.neighbours].map(({ passId }) => passId));
  const { day } = context.day;
  return context.day.passes
    .filter(({ id, fromMs }) => !served.has(id) && fromMs >= day.fromMs && fromMs < day.toMs)
    .flatMap((pass) => explain(context, contacts, pass));
}

export const openPasses = (
  day: DayModel,
  facts: Facts,
  contacts: readonly ContactModel[],
): OpenPassReasons[] => openPassesIn(planContext(day, facts), contacts);
