import type { PlanContext } from '../../../shared/schedule/context.ts';
import { guardMs } from '../../../shared/schedule/holding.ts';
import type { ContactModel, PassModel } from '../../../shared/schedule/model.ts';
import type { Interval } from '../../../shared/time.ts';
import type { Assignment, Column, Conflict, Resource } from '../model/assignment.ts';
import { channelGroups, type ChannelGroup } from './channel-groups.ts';
import { findContention } from './contention.ts';
import { askedOfDay } from './demands.ts';
import { fixedPlan, type FixedPlan } from './fixed-plan.ts';
import { margins } from './open-pieces.ts';
import {
  countOptions,
  optionsKeeping,
  optionsOfPass,
  type Cutting,
  type Option,
} from './options.ts';
import { piecesOfPass, type CompileSetting, type PassPieces } from './pass-pieces.ts';
import { LONG_MS } from './variants.ts';
import { worthOf } from './worth.ts';

export interface CompileQuestion {
  context: PlanContext;
  /** Contacts that stand: of the neighbouring days and of this one. */
  fixed: readonly ContactModel[];
  /** Contacts of the current plan that may change; each is offered unchanged as well. */
  current: readonly ContactModel[];
  /** Passes that may be served; null: every pass that no fixed contact serves. */
  passes: readonly PassModel[] | null;
  apart: ReadonlySet<string>;
  /** Step of the hand-over instants of trimmed contacts; null: whole pieces only; left out: as fine as pays. */
  gridMs?: number | null;
}

export interface CompiledDay {
  assignment: Assignment;
  /** One for each column. */
  options: Option[];
  groups: ChannelGroup[];
  fixed: FixedPlan;
  /** Columns that keep a contact of the current plan. */
  kept: number[];
  /** Step of the hand-over instants of trimmed contacts; null: nothing is trimmed. */
  gridMs: number | null;
  /** Something contends, but no grid fits the budget: pieces are used whole. */
  wholeOnly: boolean;
}

/** A pass with an hours-long window may bear several contacts. */
const isLong = (context: PlanContext, pass: PassModel): boolean =>
  context.day.faces.some((face) =>
    context
      .windowsOf(pass.id, face.id, 'receive')
      .some(({ fromMs, toMs }) => toMs - fromMs > LONG_MS),
  );

const sameLegs = (a: Option, b: Option): boolean => {
  const leg = (one: Option['transmit'], other: Option['transmit']): boolean =>
    one?.group === other?.group && one?.fromMs === other?.fromMs && one?.toMs === other?.toMs;
  return leg(a.receive, b.receive) && leg(a.transmit, b.transmit);
};

/** Options of a pass; one that equals a current contact stands for that contact unchanged. */
function withCurrent(
  { context, current }: CompileQuestion,
  setting: CompileSetting,
  pass: PassModel,
  found: Option[],
): Option[] {
  const options = [...found];
  for (const contact of current) {
    const satellite = context.satellites.get(contact.satelliteId);
    if (contact.passId !== pass.id || !satellite) continue;
    const guard = guardMs(context.day.station, satellite);
    for (const keeping of optionsKeeping(setting, contact, guard)) {
      const same = options.findIndex((option) => sameLegs(option, keeping));
      if (same >= 0) options[same] = keeping;
      else options.push(keeping);
    }
  }
  return options;
}

/** Steps of the hand-over instants, ms, the finest first. */
const GRIDS_MS = [20_000, 30_000, 60_000, 120_000, 240_000];
/** So many columns are solved in a second or so at ordinary load. */
const COLUMN_BUDGET = 5000;

/** The finest grid that stays within the budget; none where even the coarsest one does not: then pieces stay whole. */
function chooseGrid(
  pieces: readonly PassPieces[],
  contentionOf: Cutting['contentionOf'],
): number | null {
  const fits = (gridMs: number): boolean => {
    let count = 0;
    for (const one of pieces) {
      count += countOptions(one, { contentionOf, gridMs });
      if (count > COLUMN_BUDGET) return false;
    }
    return true;
  };
  return GRIDS_MS.find(fits) ?? null;
}

const contends = (pieces: readonly PassPieces[], contentionOf: Cutting['contentionOf']): boolean =>
  pieces.some((one) =>
    [...one.receive, ...one.transmit].some((piece) => {
      const { crowds, meetings } = contentionOf(one, piece);
      return crowds.length + meetings.length > 0;
    }),
  );

function optionsOfDay(
  question: CompileQuestion,
  setting: CompileSetting,
): { options: Option[]; gridMs: number | null; wholeOnly: boolean } {
  const open = openPasses(question, setting.fixed);
  const pieces = open.flatMap((pass) => piecesOfPass(setting, pass) ?? []);
  const contentionOf = findContention(setting, pieces);
  const contested = contends(pieces, contentionOf);
  const chosen = (): number | null => (contested ? chooseGrid(pieces, contentionOf) : null);
  const gridMs = question.gridMs === undefined ? chosen() : question.gridMs;
  const options = pieces.flatMap((one) =>
    withCurrent(question, setting, one.pass, optionsOfPass(one, { contentionOf, gridMs })),
  );
  return { options, gridMs, wholeOnly: contested && gridMs === null };
}

function openPasses({ context, passes }: CompileQuestion, fixed: FixedPlan): PassModel[] {
  const all = passes ?? context.day.passes;
  return all.filter((pass) => isLong(context, pass) || !fixed.servesPass(pass.id));
}

/** Numbers of the day's things in the assignment: resources are groups, then faces' transmit beams, then satellites. */
interface Numbering {
  groups: readonly ChannelGroup[];
  faces: ReadonlyMap<string, number>;
  satellites: ReadonlyMap<string, number>;
  families: ReadonlyMap<string, number>;
  originMs: number;
}

const numbered = (ids: readonly string[]): ReadonlyMap<string, number> =>
  new Map(ids.map((id, index) => [id, index]));

const beamOf = (numbering: Numbering, faceId: string, direction: 'receive' | 'transmit'): number =>
  2 * (numbering.faces.get(faceId) ?? -1) + (direction === 'receive' ? 0 : 1);

function columnOf(context: PlanContext, numbering: Numbering, option: Option): Column {
  const { originMs, groups, faces, satellites } = numbering;
  const { pass, receive, transmit, faceId } = option;
  const satellite = context.satellites.get(pass.satelliteId);
  const held = (leg: Interval & { group: ChannelGroup }): Column['uses'][number] => {
    const [before, after] = satellite ? margins(leg.group, satellite) : [0, 0];
    const [from, to] = [leg.fromMs - before - originMs, leg.toMs + after - originMs];
    return { resource: leg.group.index, from, to };
  };
  const span = ({ fromMs, toMs }: Interval): { from: number; to: number } => ({
    from: fromMs - originMs,
    to: toMs - originMs,
  });
  const face = groups.length + (faces.get(faceId) ?? -1);
  const one = groups.length + faces.size + (satellites.get(pass.satelliteId) ?? -1);
  const uses = [held(receive), { resource: one, ...span(receive) }];
  const beams = [{ beam: beamOf(numbering, faceId, 'receive'), ...span(receive) }];
  if (transmit) {
    uses.push(held(transmit), { resource: face, ...span(transmit) });
    beams.push({ beam: beamOf(numbering, faceId, 'transmit'), ...span(transmit) });
  }
  const unchanged = option.keeps !== null && option.sameChannels;
  const value = worthOf(context, { ...option, unchanged });
  return { family: numbering.families.get(pass.id) ?? -1, uses, beams, value };
}

function resourcesOf(context: PlanContext, numbering: Numbering, fixed: FixedPlan): Resource[] {
  const { originMs } = numbering;
  const cut = ({ fromMs, toMs }: Interval): Resource['cuts'][number] => ({
    from: fromMs - originMs,
    to: toMs - originMs,
    amount: 1,
  });
  return [
    ...numbering.groups.map((group) => ({
      name: `${group.faceId} ${group.direction} ${group.channels.map(({ label }) => label).join(' ')}`,
      capacity: group.channels.length,
      cuts: group.channels.flatMap(({ id }) => fixed.heldOn(id)).map(cut),
    })),
    ...context.day.faces.map((face) => ({
      name: `transmit beams of ${face.label}`,
      capacity: face.transmitBeamLimit,
      cuts: fixed.legsOn(face.id, 'transmit').map(({ leg }) => cut(leg)),
    })),
    // Fixed contacts of a satellite are cut out of its pieces already.
    ...context.day.satellites.map(({ name }) => ({ name, capacity: 1, cuts: [] })),
  ];
}

function conflictsOf(context: PlanContext, numbering: Numbering): Conflict[] {
  const { families, originMs } = numbering;
  return context.facts.conflicts.flatMap((conflict) => {
    const [a, b] = conflict.passIds.map((id) => families.get(id));
    if (a === undefined || b === undefined) return [];
    const beam = beamOf(numbering, conflict.faceId, conflict.direction);
    return [{ beam, a, b, from: conflict.fromMs - originMs, to: conflict.toMs - originMs }];
  });
}

/** The day as an assignment problem: everything that facts, closures and fixed contacts leave open. */
export function compileDay(question: CompileQuestion): CompiledDay {
  const { context } = question;
  const groups = channelGroups(context.day, question.apart);
  const fixed = fixedPlan(context, question.fixed);
  const setting = { context, fixed, groups };
  const { options, gridMs, wholeOnly } = optionsOfDay(question, setting);
  const families = [...new Set(options.map(({ pass }) => pass.id))];
  const numbering = {
    groups,
    faces: numbered(context.day.faces.map(({ id }) => id)),
    satellites: numbered(context.day.satellites.map(({ id }) => id)),
    families: numbered(families),
    originMs: context.day.day.fromMs,
  };
  const assignment: Assignment = {
    resources: resourcesOf(context, numbering, fixed),
    families: families.map((id) => {
      const pass = context.passes.get(id);
      return { limit: pass && isLong(context, pass) ? null : 1 };
    }),
    columns: options.map((option) => columnOf(context, numbering, option)),
    conflicts: conflictsOf(context, numbering),
    ...askedOfDay(context, options, question.fixed),
  };
  const kept = [...options.keys()].filter((index) => options[index]?.keeps);
  return { assignment, options, groups, fixed, kept, gridMs, wholeOnly };
}
