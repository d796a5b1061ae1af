import { classNames } from '../lib/class-names.ts';
import { isSecondForm, seriesColor } from '../lib/series.ts';

/** The colour of a mission beside its name; names themselves are set in ink. A seventh mission wears a ring. */
export function MissionMark({
  series,
  size = 10,
  className,
}: {
  series: number | null;
  size?: number;
  className?: string;
}) {
  const color = series === null ? 'var(--ink-faint)' : seriesColor(series);
  const ring = series === null || isSecondForm(series);
  return (
    <span
      aria-hidden="true"
      className={classNames('inline-block shrink-0 rounded-mark', className)}
      style={{
        width: size,
        height: size,
        ...(ring ? { border: `2.5px solid ${color}` } : { background: color }),
      }}
    />
  );
}
