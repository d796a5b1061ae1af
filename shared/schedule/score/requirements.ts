import { intersect, MINUTE_MS, SECOND_MS, toIso } from '../../time.ts';
import type { ContactModel, DayModel, RequirementModel } from '../model.ts';
import { linesAt } from '../services.ts';
import { clock, spoken } from '../words.ts';
import { gapsOf, longestGap, type Gap } from './gaps.ts';
import { asksOn } from './hours.ts';
import { makeQualifier, type Served } from './qualifying.ts';

/** What a requirement line asked and got on a day, for one satellite or (satelliteId null) for all of them together. */
export interface RequirementResult {
  requirementId: string;
  missionId: string;
  satelliteId: string | null;
  what: RequirementModel['what'];
  /** Contacts, minutes or Mbit at least; for a gap the longest allowed, minutes. */
  asked: number;
  /** The most that is wanted of contacts, minutes or Mbit; null: no limit. */
  most: number | null;
  /** What the plan gives, in the unit of `asked`; for a gap the longest one. */
  given: number;
  met: boolean;
  /** The mission gets more than it wants (a warning, never a refusal). */
  exceeded: boolean;
  note: string | null;
}

type Judged = Pick<RequirementResult, 'asked' | 'given' | 'met' | 'exceeded' | 'note'>;

/** Contacts that count for a line, with how they serve it. */
interface Counted {
  contact: ContactModel;
  served: Served;
  rateKbps: number;
}

const rounded = (value: number): number => Math.round(value * 1000) / 1000;

function judgeAmount(line: RequirementModel, counted: readonly Counted[]): Judged {
  const amount = {
    contacts: () => counted.length,
    minutes: () => counted.reduce((sum, { served }) => sum + served.receiveMs / MINUTE_MS, 0),
    volume: () =>
      counted.reduce(
        (sum, { served, rateKbps }) => sum + (rateKbps / 1000) * (served.receiveMs / SECOND_MS),
        0,
      ),
    gap: () => 0,
  };
  const asked = line.least ?? 0;
  const given = rounded(amount[line.what]());
  const exceeded = line.most !== null && given > line.most;
  return { asked, given, met: given >= asked, exceeded, note: null };
}

function gapNote(gap: Gap, mostMs: number): string {
  const length = spoken(gap.toMs - gap.fromMs);
  const span = `${clock(gap.fromMs)} to ${clock(gap.toMs)}`;
  if (!gap.openAfter) return `longest gap ${length}, ${span}`;
  const last = toIso(gap.fromMs + mostMs);
  return `open after ${clock(gap.fromMs)}: the next contact must begin by ${last.slice(0, 10)} ${clock(gap.fromMs + mostMs)}`;
}

/** The gap line: no stretch without contact longer than `most` minutes, over the edges of the day too. */
function judgeGap(line: RequirementModel, day: DayModel, counted: readonly Counted[]): Judged {
  const mostMs = (line.most ?? 0) * MINUTE_MS;
  const gaps = gapsOf(
    day.day,
    counted.map(({ contact }) => contact.receive),
  );
  const worst = longestGap(gaps);
  const givenMs = worst ? worst.toMs - worst.fromMs : 0;
  return {
    asked: line.most ?? 0,
    given: rounded(givenMs / MINUTE_MS),
    met: givenMs <= mostMs,
    exceeded: false,
    note: worst ? gapNote(worst, mostMs) : null,
  };
}

/** A contact belongs to the day in which its receive leg begins. */
const beginsIn = (day: DayModel, contact: ContactModel): boolean =>
  intersect(day.day, { fromMs: contact.receive.fromMs, toMs: contact.receive.fromMs + 1 }) !== null;

/** What every requirement line of the day's missions asked and gets from these contacts (and the neighbouring days'). */
export function judgeRequirements(
  day: DayModel,
  contacts: readonly ContactModel[],
): RequirementResult[] {
  const qualify = makeQualifier(day);
  const satellites = new Map(day.satellites.map((satellite) => [satellite.id, satellite]));
  const ids = new Set(contacts.map(({ id }) => id));
  const all = [...contacts, ...day.neighbours.filter(({ id }) => !ids.has(id))];
  const judge = (line: RequirementModel, satelliteId: string | null): RequirementResult => {
    const counted = all
      .filter((contact) => contact.missionId === line.missionId)
      .filter((contact) => satelliteId === null || contact.satelliteId === satelliteId)
      .map((contact) => {
        const rateKbps = satellites.get(contact.satelliteId)?.downlink.rateKbps ?? 0;
        return { contact, served: qualify(line, contact), rateKbps };
      })
      .filter(({ served }) => served.counts);
    const ofDay = counted.filter(({ contact }) => beginsIn(day, contact));
    const judged = line.what === 'gap' ? judgeGap(line, day, counted) : judgeAmount(line, ofDay);
    const most = line.what === 'gap' ? null : line.most;
    const { id: requirementId, missionId, what } = line;
    return { requirementId, missionId, satelliteId, what, most, ...judged };
  };
  return day.missions.flatMap((mission) =>
    linesAt(day, mission.id)
      .filter((line) => asksOn(line, day.day.fromMs))
      .flatMap((line) =>
        line.appliesTo === 'together'
          ? [judge(line, null)]
          : day.satellites
              .filter((satellite) => satellite.missionId === mission.id)
              .map((satellite) => judge(line, satellite.id)),
      ),
  );
}
