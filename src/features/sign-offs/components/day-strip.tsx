import type { Contact } from '../../../../shared/schemas/plan.ts';
import { DAY_MS, dayInterval, HOUR_MS } from '../../../../shared/time.ts';
import { seriesColor } from '../../../lib/series.ts';

interface Props {
  day: string;
  contacts: readonly Contact[];
  series: number | null;
}

const WIDTH = 960;
const HEIGHT = 34;

/** The mission's day at a glance, 00:00 to 24:00. */
export function DayStrip({ day, contacts, series }: Props) {
  const { fromMs } = dayInterval(day);
  const x = (ms: number): number => ((ms - fromMs) / DAY_MS) * WIDTH;
  const color = series === null ? 'var(--ink-muted)' : seriesColor(series);
  return (
    <div className="px-4 pb-2">
      <svg
        viewBox={`0 0 ${WIDTH} ${HEIGHT + 18}`}
        role="img"
        aria-label={`${contacts.length} contacts over the day`}
        className="w-full"
      >
        <rect width={WIDTH} height={HEIGHT} fill="var(--sheet)" />
        {Array.from({ length: 9 }, (_, index) => index * 3).map((hour) => (
          <g key={hour}>
            <path d={`M${x(fromMs + hour * HOUR_MS)} 0v${HEIGHT}`} stroke="var(--line)" />
            <text
              x={Math.min(WIDTH - 18, Math.max(18, x(fromMs + hour * HOUR_MS)))}
              y={HEIGHT + 14}
              textAnchor="middle"
              fontSize="12"
              fill="var(--ink-muted)"
            >
              {String(hour).padStart(2, '0')}:00
            </text>
          </g>
        ))}
        {contacts.map(({ id, receive, transmit }) => (
          <g key={id} fill={color}>
            <rect
              x={x(Date.parse(receive.fromUtc))}
              y="5"
              width={Math.max(1.5, x(Date.parse(receive.toUtc)) - x(Date.parse(receive.fromUtc)))}
              height="15"
            />
            {transmit && (
              <rect
                x={x(Date.parse(transmit.fromUtc))}
                y="22"
                width={Math.max(
                  1.5,
                  x(Date.parse(transmit.toUtc)) - x(Date.parse(transmit.fromUtc)),
                )}
                height="7"
              />
            )}
          </g>
        ))}
        <path d={`M0 ${HEIGHT}H${WIDTH}`} stroke="var(--ink)" />
      </svg>
      <p className="text-caption text-ink-muted">Upper row: downlink; lower row: uplink</p>
    </div>
  );
}
