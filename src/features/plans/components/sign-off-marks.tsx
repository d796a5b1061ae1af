import type { PlanSummary } from '../../../../shared/schemas/plan.ts';
import { Icon, type IconName } from '../../../components/icon.tsx';
import { MissionMark } from '../../../components/mission-mark.tsx';
import { classNames } from '../../../lib/class-names.ts';
import { clockMinutes, monthDayClock } from '../../../lib/format-time.ts';

type SignOff = PlanSummary['signOffs'][number];

interface Props {
  signOffs: readonly SignOff[];
  plan: Pick<PlanSummary, 'state' | 'signableMissionIds' | 'day'>;
  series: (missionId: string) => number | null;
}

/** Signatures of the last round: icon, mission, what became of it. */
export function SignOffMarks({ signOffs, plan, series }: Props) {
  if (signOffs.length === 0) return null;
  if (signOffs.length > 1 && signOffs.every(isSigned)) return <AllSigned signOffs={signOffs} />;
  return (
    <div className="flex items-center gap-3">
      <p className="hidden text-right text-caption text-ink-muted desk:block">
        Sign-off,
        <br />
        {plan.state === 'in-review' ? 'this round' : 'last round'}
      </p>
      <ul className="flex flex-wrap gap-y-1" aria-label="Sign-off by mission">
        {signOffs.map((signOff) => (
          <SignOffMark
            key={signOff.missionId}
            signOff={signOff}
            series={series(signOff.missionId)}
            yours={plan.signableMissionIds.includes(signOff.missionId)}
          />
        ))}
      </ul>
    </div>
  );
}

const isSigned = ({ state }: SignOff): boolean => state === 'approved' || state === 'unchanged';

/** Good news needs one line. */
function AllSigned({ signOffs }: { signOffs: readonly SignOff[] }) {
  const names = signOffs.map(({ missionName, byName }) => `${missionName} by ${byName ?? '–'}`);
  return (
    <p className="flex items-center gap-2" title={names.join(', ')}>
      <Icon name="approve" size={18} className="text-ok-text" />
      <span className="flex flex-col">
        <span className="font-semibold">All {signOffs.length} missions</span>
        <span className="text-caption text-ok-text">signed this revision</span>
      </span>
    </p>
  );
}

interface Look {
  icon: IconName;
  tone: string;
  words: string;
}

const timeOf = (atUtc: string | null): string => {
  if (!atUtc) return '';
  const ms = Date.parse(atUtc);
  return ` ${clockMinutes(ms)}`;
};

function lookOf(signOff: SignOff, yours: boolean): Look {
  switch (signOff.state) {
    case 'approved':
      return { icon: 'approve', tone: 'text-ok-text', words: `signed${timeOf(signOff.atUtc)}` };
    case 'unchanged':
      return { icon: 'approve', tone: 'text-ok-text', words: 'signed, unchanged' };
    case 'returned':
      return {
        icon: 'returned',
        tone: 'text-warn-text',
        words: `returned${timeOf(signOff.atUtc)}`,
      };
    case 'pending':
      return yours
        ? { icon: 'clock', tone: 'text-info-text', words: 'your turn' }
        : { icon: 'clock', tone: 'text-ink-muted', words: 'not yet signed' };
  }
}

function SignOffMark({
  signOff,
  series,
  yours,
}: {
  signOff: SignOff;
  series: number | null;
  yours: boolean;
}) {
  const { icon, tone, words } = lookOf(signOff, yours);
  const title = [
    signOff.byName && `by ${signOff.byName}`,
    signOff.atUtc && `${monthDayClock(Date.parse(signOff.atUtc))} UTC`,
    signOff.comment && `“${signOff.comment}”`,
  ]
    .filter(Boolean)
    .join(', ');
  return (
    <li
      title={title || undefined}
      className="flex items-center gap-2 border-l border-line px-3 first:border-l-0 first:pl-0 last:pr-0"
    >
      <Icon name={icon} size={18} className={tone} />
      <span className="flex flex-col">
        <span className="flex items-center gap-1.5 font-semibold">
          <MissionMark series={series} size={8} />
          {signOff.missionName}
        </span>
        <span className={classNames('figures text-caption whitespace-nowrap', tone)}>{words}</span>
      </span>
    </li>
  );
}
