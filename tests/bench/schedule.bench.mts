/**
 * Assignment of whole days with real geometry, beside the two plans people make by hand, in the same run. Only
 * validity, the honesty of the bound and the proof of the small day decide; the seconds are for the reader.
 */
import { contactWorth } from '../../server/solver/compile/worth.ts';
import { named } from '../../server/solver/changes.ts';
import { solveDay } from '../../server/solver/solve-day.ts';
import { verifyPlan } from '../../server/verify/verify-plan.ts';
import { planContext, type PlanContext } from '../../shared/schedule/context.ts';
import { makeFacts } from '../../shared/schedule/facts/make-facts.ts';
import type { ContactModel } from '../../shared/schedule/model.ts';
import { openPassesIn } from '../../shared/schedule/reasons/open-passes.ts';
import { judgeContacts } from '../../shared/schedule/rules/judge-plan.ts';
import { judgeRequirements } from '../../shared/schedule/score/requirements.ts';
import { inventedDay, type InventedDayOptions } from '../support/schedule/invented-day.ts';
import { byPriority, firstComeFirstServed } from '../support/schedule/simple-planners.ts';

interface Case {
  name: string;
  options: Partial<InventedDayOptions>;
  limitSeconds: number;
  /** The run must end proven. */
  mustProve: boolean;
}

const cases: Case[] = [
  {
    name: '100 passes, 3 channels',
    options: { satellites: 16, receiveChannels: 3 },
    limitSeconds: 20,
    mustProve: true,
  },
  {
    name: '100 passes, 1 channel',
    options: { satellites: 16, receiveChannels: 1, transmitChannels: 1 },
    limitSeconds: 20,
    mustProve: true,
  },
  {
    name: '300 passes, 4 channels, 2 faces',
    options: { satellites: 50, receiveChannels: 4, faces: 2 },
    limitSeconds: 20,
    mustProve: false,
  },
  {
    name: '370 passes, 8 channels, 4 faces',
    options: { satellites: 60, receiveChannels: 8, transmitChannels: 4, faces: 4 },
    limitSeconds: 20,
    mustProve: false,
  },
];

const timed = <T,>(work: () => T): [T, number] => {
  const began = performance.now();
  const result = work();
  return [result, performance.now() - began];
};

const described = (context: PlanContext, contacts: readonly ContactModel[]): string => {
  const minutes = contacts.reduce((sum, one) => sum + contactWorth(context, one, false), 0) / 60;
  const unmet = judgeRequirements(context.day, contacts).filter(({ met }) => !met).length;
  return `${contacts.length} contacts, ${minutes.toFixed(0)} weighted min, ${unmet} unmet`;
};

async function bench({ name, options, limitSeconds, mustProve }: Case): Promise<boolean> {
  const day = inventedDay({ seed: 11, ...options });
  const [facts, factsMs] = timed(() => makeFacts(day));
  const context = planContext(day, facts);
  const began = performance.now();
  const result = await solveDay(
    { day, facts, current: [], mode: 'new', timeLimitSeconds: limitSeconds },
    { signal: new AbortController().signal, onProgress: () => undefined },
  );
  const wallMs = performance.now() - began;
  const contacts = named(result.contacts);
  const [ruled, rulesMs] = timed(() => judgeContacts(context, contacts));
  const [checked, checkMs] = timed(() => verifyPlan(day, contacts));
  const [open, reasonsMs] = timed(() => openPassesIn(context, contacts));
  const [arrival, arrivalMs] = timed(() => firstComeFirstServed(context));
  const [priority, priorityMs] = timed(() => byPriority(context));
  const ms = (value: number): string => `${value.toFixed(0)} ms`;
  console.log(`${name}: ${day.passes.length} passes, ${result.columns} columns`);
  console.log(
    `  facts ${ms(factsMs)}, solved ${ms(1000 * result.seconds)} (with its thread ${ms(wallMs)}), rules ${ms(rulesMs)}, check ${ms(checkMs)}, reasons for ${open.length} ${ms(reasonsMs)}`,
  );
  console.log(`  solver          ${described(context, contacts)}; ${result.words}`);
  console.log(`  by priority     ${described(context, priority)} (${ms(priorityMs)})`);
  console.log(`  first come      ${described(context, arrival)} (${ms(arrivalMs)})`);
  const honest = result.bound === null || result.bound >= result.objective - 1e-6;
  const valid = ruled.length === 0 && checked.length === 0;
  const proven = !mustProve || result.provenance === 'proven';
  if (!honest || !valid || !proven)
    console.log(`  FAILS: valid ${valid}, honest ${honest}, proven ${proven}`);
  return honest && valid && proven;
}

let good = true;
for (const one of cases) good = (await bench(one)) && good;
process.exitCode = good ? 0 : 1;
