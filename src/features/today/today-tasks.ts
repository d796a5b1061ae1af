import type { ElementSet } from '../../../shared/schemas/element-set.ts';
import type { PlanSummary } from '../../../shared/schemas/plan.ts';
import type { Station } from '../../../shared/schemas/station.ts';
import type { IconName } from '../../components/icon.tsx';
import type { Tone } from '../../components/chip.tsx';
import { counted } from '../../lib/format-number.ts';
import { longDay, nextDay, relativeTime } from '../../lib/format-time.ts';

/** Something that waits for a person, or a fact that belongs on the first page; most urgent first. */
export interface Task {
  key: string;
  tone: Tone;
  icon: IconName;
  title: string;
  words: string;
  to: string;
  act: string;
}

interface Question {
  today: string;
  now: number;
  plans: readonly PlanSummary[];
  sets: readonly ElementSet[];
  station: Station | null;
  isScheduler: boolean;
  isCrew: boolean;
  isLead: boolean;
}

/** Common practice: a low orbit's set older than two days points noticeably off. */
const OLD_HOURS = 48;

const inhibit = ({ station }: Question): Task[] =>
  station?.transmitInhibit
    ? [
        {
          key: 'inhibit',
          tone: 'danger',
          icon: 'needsAttention',
          title: 'Transmit inhibit, people at the array',
          words: `${station.transmitInhibit.reason}, by ${station.transmitInhibit.by}`,
          to: `/stations/${station.id}`,
          act: 'Look at the station',
        },
      ]
    : [];

const toSign = ({ plans, isLead, now }: Question): Task[] =>
  isLead
    ? plans
        .filter((plan) => plan.signableMissionIds.length > 0)
        .map((plan) => ({
          key: `sign ${plan.id}`,
          tone: 'info',
          icon: 'clock',
          title: `${longDay(plan.day)} waits for your sign-off`,
          words: `${counted(plan.signableMissionIds.length, 'mission')} of yours; wanted ${relativeTime(Date.parse(plan.cutOffUtc), now)}`,
          to: `/plans/${plan.id}/sign-off`,
          act: 'Read and sign',
        }))
    : [];

const forScheduler = (question: Question): Task[] => {
  const { plans, isScheduler, today, now } = question;
  if (!isScheduler) return [];
  const tomorrow = nextDay(today);
  const tasks = plans.flatMap((plan): Task[] => {
    const base = { to: `/plans/${plan.id}` };
    const day = longDay(plan.day);
    if (plan.needsAttention && plan.state !== 'superseded')
      return [
        {
          ...base,
          key: `attention ${plan.id}`,
          tone: 'warn',
          icon: 'warning',
          title: `${day} needs attention`,
          words: plan.needsAttention,
          act: 'Open the plan',
        },
      ];
    if (plan.returned)
      return [
        {
          ...base,
          key: `returned ${plan.id}`,
          tone: 'warn',
          icon: 'returned',
          title: `${day} was returned`,
          words: `${plan.returned.byName}: ${plan.returned.comment}`,
          act: 'Open the plan',
        },
      ];
    if (plan.state === 'approved')
      return [
        {
          ...base,
          key: `release ${plan.id}`,
          tone: 'ok',
          icon: 'approve',
          title: `${day} is approved`,
          words: 'Every mission has signed. It can be released.',
          act: 'Release it',
        },
      ];
    if (plan.state === 'in-review') {
      const waiting = plan.signOffs.filter((one) => one.state === 'pending');
      return [
        {
          ...base,
          key: `review ${plan.id}`,
          tone: 'info',
          icon: 'inReview',
          title: `${day} is in review`,
          words: `${waiting.map((one) => one.missionName).join(', ')} not yet signed; cut-off ${relativeTime(Date.parse(plan.cutOffUtc), now)}`,
          act: 'Open the plan',
        },
      ];
    }
    if (plan.state === 'draft')
      return [
        {
          ...base,
          key: `draft ${plan.id}`,
          tone: 'neutral',
          icon: 'pencil',
          title: `${day} is a draft`,
          words: `${plan.score.contacts} contacts of ${plan.score.passes} passes, ${plan.score.requirementsShort} requirements short`,
          act: 'Go on',
        },
      ];
    return [];
  });
  if (!plans.some((plan) => plan.day === tomorrow))
    tasks.unshift({
      key: 'no plan',
      tone: 'warn',
      icon: 'calendar',
      title: 'Tomorrow has no plan yet',
      words: longDay(tomorrow),
      to: '/plans',
      act: 'Begin it',
    });
  return tasks;
};

const forCrew = ({ plans, sets, isCrew, today }: Question): Task[] => {
  if (!isCrew) return [];
  const old = sets.filter((set) => set.ageHours > OLD_HOURS);
  const running = plans.find((plan) => plan.day === today && plan.state === 'released');
  return [
    ...(old.length > 0
      ? [
          {
            key: 'old sets',
            tone: 'warn' as const,
            icon: 'clock' as const,
            title: `${counted(old.length, 'element set')} older than two days`,
            words: old.map((set) => set.satelliteName ?? set.catalogNumber).join(', '),
            to: '/element-sets',
            act: 'Load fresh ones',
          },
        ]
      : []),
    ...(running
      ? [
          {
            key: 'shift',
            tone: 'info' as const,
            icon: 'play' as const,
            title: 'The day is running',
            words: `${running.score.contacts} contacts, revision ${running.revision}`,
            to: '/shift',
            act: 'Go on shift',
          },
        ]
      : []),
  ];
};

const RANK: Record<Tone, number> = { danger: 0, warn: 1, info: 2, ok: 2, neutral: 3 };

export const todayTasks = (question: Question): Task[] =>
  [
    ...inhibit(question),
    ...toSign(question),
    ...forScheduler(question),
    ...forCrew(question),
  ].toSorted((a, b) => RANK[a.tone] - RANK[b.tone]);
