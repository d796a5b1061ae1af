import { dayOfYear, toIso } from '../../../shared/time.ts';
import { useNow } from '../../hooks/use-now.ts';
import { useStation } from '../../hooks/use-station.ts';
import { clockSeconds, localClock } from '../../lib/format-time.ts';

/** UTC by the server's clock, with day of year, and the station's own time beside it. */
export function HeaderClock() {
  const now = useNow();
  const { station } = useStation();
  const local = station && localClock(now, station.timeZone);
  return (
    <div className="figures flex flex-col justify-center wide:flex-row wide:items-baseline wide:gap-x-3">
      <p className="flex items-baseline gap-1.5 whitespace-nowrap">
        <time dateTime={toIso(now)} className="text-page font-medium">
          {clockSeconds(now)}
        </time>
        <span className="text-caption font-semibold">UTC</span>
      </p>
      <p className="hidden text-caption whitespace-nowrap text-ink-muted narrow:block">
        {toIso(now).slice(0, 10)} · day {dayOfYear(now)}
        {local && <span> · {local} at the station</span>}
      </p>
    </div>
  );
}
