import { HOUR_MS, MINUTE_MS } from '../../../../../shared/time.ts';
import { fitBrush } from '../../../../charts/load-brush.tsx';
import { Button, IconButton } from '../../../../components/button.tsx';
import { clockMinutes } from '../../../../lib/format-time.ts';
import { decimals } from '../../../../lib/format-number.ts';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import { usePlanView } from '../../hooks/plan-view.ts';

const ZOOMS = [
  30 * MINUTE_MS,
  45 * MINUTE_MS,
  90 * MINUTE_MS,
  3 * HOUR_MS,
  6 * HOUR_MS,
  12 * HOUR_MS,
  24 * HOUR_MS,
];

/** How to read the blocks, and the zoom from the whole day to half an hour. */
export function CalendarFoot() {
  const { plan, span } = usePlanDesk();
  const { stretch, setStretch } = usePlanView();
  const length = stretch.toMs - stretch.fromMs;
  const zoomTo = (next: number): void => {
    const middle = (stretch.fromMs + stretch.toMs) / 2;
    const from = Math.round((middle - next / 2) / MINUTE_MS) * MINUTE_MS;
    setStretch(fitBrush({ fromMs: from, toMs: from + next }, span), true);
  };
  const nearer = [...ZOOMS].reverse().find((zoom) => zoom < length);
  const wider = ZOOMS.find((zoom) => zoom > length);
  return (
    <div className="figures flex min-h-7.5 shrink-0 items-center gap-2 border-t border-line px-3 text-caption text-ink-muted">
      <p className="min-w-0 truncate">
        Left edge: scan loss, 0 to {decimals(plan.limitOfDayDb, 1)} dB. Hatched head: set-up. Foot:
        tear-down. Dashed: a pass left open.
      </p>
      <span className="ml-auto whitespace-nowrap">
        {clockMinutes(stretch.fromMs)}–
        {stretch.toMs >= span.toMs ? '24:00' : clockMinutes(stretch.toMs)}
      </span>
      <IconButton
        icon="minus"
        label="Show a longer stretch"
        className="size-6.5!"
        disabled={wider === undefined}
        onClick={() => wider && zoomTo(wider)}
      />
      <IconButton
        icon="add"
        label="Show a shorter stretch"
        className="size-6.5!"
        disabled={nearer === undefined}
        onClick={() => nearer && zoomTo(nearer)}
      />
      <Button
        size="small"
        variant="quiet"
        className="min-h-6.5! text-caption!"
        onClick={() => setStretch(span, true)}
      >
        Whole day
      </Button>
    </div>
  );
}
