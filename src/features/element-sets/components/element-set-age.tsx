import { Icon } from '../../../components/icon.tsx';
import { ageWords } from '../../../lib/format-time.ts';

/** Common practice for low orbits, not a rule of the product: after three days prediction error grows to seconds. */
const OLD_HOURS = 72;
const FULL_HOURS = 168;

/** Age in figures and as a bar of a week; old ones are marked by shape and word. */
export function ElementSetAge({ hours }: { hours: number }) {
  const isOld = hours > OLD_HOURS;
  return (
    <span className="figures flex items-center gap-2">
      <span className="w-11 text-right">{ageWords(Math.max(0, hours))}</span>
      <span aria-hidden="true" className="block h-1.5 w-16 rounded-full bg-shade">
        <span
          className={`block h-full rounded-full ${isOld ? 'bg-warn-mark' : 'bg-ink-faint'}`}
          style={{ width: `${Math.min(100, Math.max(3, (hours / FULL_HOURS) * 100))}%` }}
        />
      </span>
      {isOld && (
        <span className="flex items-center gap-1 text-caption font-semibold text-warn-text">
          <Icon name="clock" size={14} />
          old
        </span>
      )}
    </span>
  );
}
