import { useState } from 'react';
import type { OpenPass } from '../../../../shared/schemas/plan.ts';
import { ToneWord } from '../../../components/chip.tsx';
import { Button } from '../../../components/button.tsx';
import { PassThumb } from '../../../components/pass-thumb.tsx';
import { Skeleton } from '../../../components/states.tsx';
import { classNames } from '../../../lib/class-names.ts';
import { counted, degrees, directionWords } from '../../../lib/format-number.ts';
import { clockSpan } from '../../../lib/format-time.ts';
import { seriesColor } from '../../../lib/series.ts';
import { usePlanDesk } from '../hooks/plan-desk.ts';
import { usePlanEdits } from '../hooks/plan-edits.ts';
import { usePlanView } from '../hooks/plan-view.ts';
import { PASS_DRAG_TYPE } from '../model/pass-drag.ts';
import { lookOfPass, toneOfPass } from '../model/reasons.ts';

const FIRST = 6;

/** What is not on the plan, sorted by what can be done about it. */
export function NotOnPlan() {
  const { openPasses, allows } = usePlanDesk();
  const { open } = usePlanEdits();
  const of = (standing: OpenPass['standing']): OpenPass[] =>
    (openPasses ?? []).filter((pass) => pass.standing === standing);
  const [free, stopped, unusable] = [of('free'), of('stopped'), of('unusable')];
  return (
    <section aria-labelledby="not-on-plan" className="flex h-full min-h-0 flex-col bg-raised">
      <h2 id="not-on-plan" className="border-b border-line px-4 py-2.5 text-section font-semibold">
        Not on the plan{' '}
        <span className="text-table font-normal text-ink-muted">
          {openPasses && counted(openPasses.length, 'pass', 'passes')}
        </span>
      </h2>
      <div
        className="min-h-0 flex-1 overflow-y-auto"
        tabIndex={0}
        role="group"
        aria-labelledby="not-on-plan"
      >
        {openPasses === null && <Skeleton rows={8} />}
        {openPasses?.length === 0 && (
          <p className="px-4 py-6 text-center text-ink-muted">Every pass of the day is served.</p>
        )}
        <Group
          title="Could be assigned"
          passes={free}
          action={
            allows('assign') &&
            free.length > 0 && (
              <Button
                variant="quiet"
                size="small"
                className="text-accent!"
                onClick={() => open({ kind: 'assignment' })}
              >
                Assign
              </Button>
            )
          }
        />
        <Group title="Stopped by a rule" passes={stopped} />
        <Group title="Not usable" passes={unusable} folded />
      </div>
    </section>
  );
}

interface GroupProps {
  title: string;
  passes: readonly OpenPass[];
  action?: React.ReactNode;
  /** Shows nothing until asked. */
  folded?: boolean;
}

function Group({ title, passes, action, folded }: GroupProps) {
  const { passId } = usePlanView();
  const [all, setAll] = useState(false);
  const first = folded ? 0 : FIRST;
  const holdsChosen = passes.findIndex((pass) => pass.passId === passId) >= first;
  const shown = all || holdsChosen ? passes : passes.slice(0, first);
  if (passes.length === 0) return null;
  return (
    <section aria-label={title}>
      <div className="flex min-h-9 items-center gap-2 px-4">
        <h3 className="font-semibold">
          {title} <span className="font-normal text-ink-muted">{passes.length}</span>
        </h3>
        <span className="ml-auto">{action}</span>
      </div>
      <ul>
        {shown.map((pass) => (
          <OpenPassRow key={pass.passId} pass={pass} />
        ))}
      </ul>
      {passes.length > first && !holdsChosen && (
        <Button
          variant="quiet"
          size="small"
          className="mx-2 mb-1 text-accent!"
          aria-expanded={all}
          onClick={() => setAll(!all)}
        >
          {all ? 'Show fewer' : `Show ${first === 0 ? 'them' : `${passes.length - first} more`}`}
        </Button>
      )}
    </section>
  );
}

function OpenPassRow({ pass }: { pass: OpenPass }) {
  const { missions, passes, ground, allows } = usePlanDesk();
  const { passId, showPass, selectPass } = usePlanView();
  const series = missions.series(pass.missionId);
  const interval = { fromMs: Date.parse(pass.aosUtc), toMs: Date.parse(pass.losUtc) };
  const chosen = pass.passId === passId;
  const { icon, word } = lookOfPass(pass);
  const known = passes.get(pass.passId);
  const draggable = allows('edit') && pass.standing !== 'unusable';
  return (
    <li
      draggable={draggable}
      onDragStart={(event) => event.dataTransfer.setData(PASS_DRAG_TYPE, pass.passId)}
      className={classNames(
        'relative border-t border-line-soft',
        chosen ? 'bg-accent-soft' : 'hover:bg-surface',
      )}
    >
      <span
        aria-hidden="true"
        className="absolute inset-y-0 left-0 w-[3px]"
        style={{ background: series === null ? 'var(--ink-faint)' : seriesColor(series) }}
      />
      <button
        type="button"
        aria-expanded={chosen}
        onClick={() => (chosen ? selectPass(null) : showPass(pass.passId, interval))}
        className="block w-full px-4 py-1.5 text-left focus-visible:-outline-offset-2"
      >
        <span className="flex items-baseline justify-between gap-2">
          <span className="font-semibold">{pass.satelliteName}</span>
          <span className="figures">{clockSpan(interval.fromMs, interval.toMs)}</span>
        </span>
        <span className="flex items-baseline justify-between gap-2">
          <ToneWord tone={toneOfPass(pass)} icon={icon} className="text-caption! whitespace-nowrap">
            {word}
          </ToneWord>
          <span className="text-caption text-ink-muted">max {degrees(pass.maxElevationDeg)}</span>
        </span>
        <span className="mt-0.5 line-clamp-2 text-caption text-ink-muted">
          {pass.reasons[0]?.message ?? (known && directionWords(known))}
        </span>
        {chosen && (
          <span className="flex justify-center pt-1.5">
            <PassThumb
              ground={ground}
              passId={pass.passId}
              series={series}
              {...interval}
              size={96}
            />
          </span>
        )}
      </button>
    </li>
  );
}
