import type { PlanContext } from '../../shared/schedule/context.ts';
import type { ContactModel, LegModel, PassModel } from '../../shared/schedule/model.ts';
import { linesAt } from '../../shared/schedule/services.ts';
import { contains, intersect, type Interval } from '../../shared/time.ts';
import { channelGroups, type ChannelGroup } from './compile/channel-groups.ts';
import { fixedPlan, type FixedPlan } from './compile/fixed-plan.ts';
import { openPieces } from './compile/open-pieces.ts';
import { optionsOfPass, type Option } from './compile/options.ts';
import { piecesOfPass } from './compile/pass-pieces.ts';
import { LONG_MS } from './compile/variants.ts';
import { missionWeight, worthOf } from './compile/worth.ts';
import type { SolvedContact } from './planned.ts';

interface Bench {
  context: PlanContext;
  /** Every channel for itself: legs have their channels here. */
  groups: ChannelGroup[];
}

/** A mission that wants no more than so much, or only at certain hours: its contacts stay as the solver made them. */
const isBounded = ({ day }: PlanContext, missionId: string): boolean =>
  linesAt(day, missionId).some(
    (line) => (line.most !== null && line.what !== 'gap') || line.hoursUtc !== null,
  );

const weightOf = ({ missions }: PlanContext, missionId: string): number =>
  missionWeight(missions.get(missionId)?.priority ?? 5);

/** The open piece on the leg's own channel around the leg. */
function pieceAround(
  { context, groups }: Bench,
  fixed: FixedPlan,
  contact: SolvedContact,
  leg: LegModel,
): Interval | null {
  const pass = context.passes.get(contact.passId);
  const satellite = context.satellites.get(contact.satelliteId);
  const group = groups.find(({ channels }) => channels[0]?.id === leg.channelId);
  if (!pass || !satellite || !group) return null;
  const pieces = context
    .windowsOf(pass.id, contact.faceId, group.direction)
    .flatMap((span) => openPieces(context, fixed, { group, pass, satellite, span }));
  return pieces.find((piece) => contains(piece, leg)) ?? null;
}

/** A contact made as long as its window and the others allow. */
function stretched(bench: Bench, fixed: FixedPlan, contact: SolvedContact): SolvedContact {
  const { day } = bench.context.day;
  const around = pieceAround(bench, fixed, contact, contact.receive);
  const span = around && intersect(around, { fromMs: day.fromMs, toMs: Infinity });
  if (!span || span.toMs - span.fromMs > LONG_MS) return contact;
  const receive = { ...contact.receive, ...span };
  const { transmit } = contact;
  const uplink = transmit && pieceAround(bench, fixed, contact, transmit);
  const inside = uplink && intersect(uplink, receive);
  return {
    ...contact,
    receive,
    transmit: transmit && inside ? { ...transmit, ...inside } : transmit,
  };
}

/** The most valuable way to serve an open pass beside a full plan. */
function filling(bench: Bench, fixed: FixedPlan, pass: PassModel): SolvedContact | null {
  const { context } = bench;
  const pieces = piecesOfPass({ ...bench, fixed }, pass);
  if (!pieces) return null;
  const cutting = { contentionOf: () => ({ crowds: [], meetings: [] }), gridMs: null };
  const worth = (option: Option): number => worthOf(context, { ...option, unchanged: false });
  const best = optionsOfPass(pieces, cutting).toSorted((a, b) => worth(b) - worth(a))[0];
  if (!best) return null;
  const leg = ({ group, fromMs, toMs }: Option['receive']): LegModel => ({
    channelId: group.channels[0]?.id ?? '',
    fromMs,
    toMs,
  });
  return {
    id: null,
    passId: pass.id,
    predictionId: pass.predictionId,
    satelliteId: pass.satelliteId,
    missionId: pass.missionId,
    faceId: best.faceId,
    receive: leg(best.receive),
    transmit: best.transmit && leg(best.transmit),
    locked: false,
  };
}

const asModel = (contact: SolvedContact, index: number): ContactModel => ({
  ...contact,
  id: contact.id ?? `thought ${index}`,
});

/**
 * What the grid of the model leaves lying about, to the second: contacts are made as long as the others allow, the
 * weightier ones first, and passes that still fit are served. Contacts in `untouched` stay; nothing gets shorter.
 */
export function polish(
  context: PlanContext,
  contacts: readonly SolvedContact[],
  untouched: ReadonlySet<SolvedContact>,
  open: readonly PassModel[],
): SolvedContact[] {
  const groups = channelGroups(context.day, new Set(context.day.channels.map(({ id }) => id)));
  const bench = { context, groups };
  const plan = [...contacts];
  const beside = (index: number): FixedPlan =>
    fixedPlan(context, [
      ...context.day.neighbours,
      ...plan.filter((_, other) => other !== index).map(asModel),
    ]);
  const order = [...plan.keys()].sort(
    (a, b) =>
      weightOf(context, plan[b]?.missionId ?? '') - weightOf(context, plan[a]?.missionId ?? ''),
  );
  for (const index of order) {
    const contact = plan[index];
    if (!contact || untouched.has(contact) || isBounded(context, contact.missionId)) continue;
    plan[index] = stretched(bench, beside(index), contact);
  }
  const waiting = open
    .filter((pass) => !isBounded(context, pass.missionId))
    .toSorted((a, b) => weightOf(context, b.missionId) - weightOf(context, a.missionId));
  for (const pass of waiting) {
    const more = filling(bench, beside(-1), pass);
    if (more) plan.push(more);
  }
  return plan;
}
