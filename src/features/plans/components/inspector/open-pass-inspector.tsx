import { z } from 'zod';
import { Edit } from '../../../../../shared/schemas/edit.ts';
import type { OpenPass } from '../../../../../shared/schemas/plan.ts';
import { Button, IconButton } from '../../../../components/button.tsx';
import { Chip } from '../../../../components/chip.tsx';
import { MissionMark } from '../../../../components/mission-mark.tsx';
import { PassCharts } from '../../../../components/pass-charts.tsx';
import { decimals, passWords } from '../../../../lib/format-number.ts';
import { clockSeconds, minutesSeconds } from '../../../../lib/format-time.ts';
import { seriesColor } from '../../../../lib/series.ts';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import { usePlanEdits } from '../../hooks/plan-edits.ts';
import { usePlanView } from '../../hooks/plan-view.ts';
import { lookOfPass, lookOfRule, toneOfPass } from '../../model/reasons.ts';
import { INSPECTOR_CHART_WIDTH } from './inspector-width.ts';
import { PassInstants } from './pass-instants.tsx';

/** A pass that is not on the plan: why, what would free it, and the way onto it. */
export function OpenPassInspector({ pass }: { pass: OpenPass }) {
  const { missions, station, plan, passes, allows } = usePlanDesk();
  const { selectPass } = usePlanView();
  const { open } = usePlanEdits();
  const series = missions.series(pass.missionId);
  const known = passes.get(pass.passId);
  const windows = (known?.windows ?? [])
    .filter(({ direction }) => direction === 'receive')
    .map((window) => ({
      ...window,
      fromMs: Date.parse(window.fromUtc),
      toMs: Date.parse(window.toUtc),
    }));
  const [fromMs, toMs] = [Date.parse(pass.aosUtc), Date.parse(pass.losUtc)];
  const tcaMs = Date.parse(pass.tcaUtc);
  const { icon, word } = lookOfPass(pass);
  return (
    <section aria-labelledby="inspected" className="flex h-full min-h-0 flex-col bg-surface">
      <div
        className="min-h-0 flex-1 overflow-y-auto px-4.5 py-3"
        tabIndex={0}
        role="group"
        aria-labelledby="inspected"
      >
        <div className="flex items-center gap-2">
          <MissionMark series={series} size={12} />
          <h2 id="inspected" className="text-section font-semibold">
            {pass.satelliteName}
          </h2>
          <Chip tone={toneOfPass(pass)} icon={icon}>
            {word}
          </Chip>
          <IconButton
            icon="close"
            label="Close the pass"
            className="-mr-2 ml-auto"
            onClick={() => selectPass(null)}
          />
        </div>
        <p className="mt-0.5 text-ink-muted">Not on the plan; {passWords(known ?? pass)}</p>
        <div className="my-2.5">
          <PassInstants
            passId={pass.passId}
            fromMs={fromMs}
            toMs={toMs}
            tcaMs={tcaMs}
            missionId={pass.missionId}
            used={windows[0] ?? null}
            usedWord="Usable"
          />
        </div>
        <Reasons pass={pass} />
        <WouldFree pass={pass} />
        {windows.length > 0 && (
          <p className="figures my-3 rounded-control bg-raised px-2.5 py-2 text-caption text-ink-muted">
            Usable{' '}
            {windows.map((window) => (
              <span key={window.fromMs} className="mr-2">
                <strong className="font-semibold text-ink">
                  {minutesSeconds(window.toMs - window.fromMs)}
                </strong>
                , {clockSeconds(window.fromMs)}–{clockSeconds(window.toMs)}, loss{' '}
                {decimals(window.minScanLossDb, 1)}–{decimals(window.maxScanLossDb, 1)} dB
              </span>
            ))}
          </p>
        )}
        <PassCharts
          passId={pass.passId}
          fromMs={fromMs}
          toMs={toMs}
          tcaMs={tcaMs}
          faceId={windows[0]?.faceId ?? null}
          color={series === null ? 'var(--ink-muted)' : seriesColor(series)}
          within={windows}
          elevationFloorDeg={station.receiveElevationFloorDeg}
          limitDb={plan.limitOfDayDb}
          width={INSPECTOR_CHART_WIDTH}
        />
      </div>
      {allows('edit') && pass.standing !== 'unusable' && (
        <div className="flex shrink-0 items-center gap-2 border-t border-line px-4.5 py-2.5">
          <Button
            size="small"
            variant="primary"
            icon="add"
            onClick={() => open({ kind: 'assign', passId: pass.passId })}
          >
            Assign this pass
          </Button>
        </div>
      )}
    </section>
  );
}

function Reasons({ pass }: { pass: OpenPass }) {
  if (pass.reasons.length === 0) return null;
  return (
    <section aria-label="Why it is not on the plan">
      <h3 className="font-semibold">Why it is not on the plan</h3>
      <ul>
        {pass.reasons.map((reason, index) => {
          const look = lookOfRule(reason.rule);
          return (
            <li key={index} className="border-t border-line-soft py-1.5 first:border-t-0">
              <span className="font-semibold text-warn-text">{look.word}.</span> {reason.message}
            </li>
          );
        })}
      </ul>
    </section>
  );
}

const Edits = z.array(Edit).min(1);

function WouldFree({ pass }: { pass: OpenPass }) {
  const { allows } = usePlanDesk();
  const { apply, isBusy } = usePlanEdits();
  if (pass.wouldFree.length === 0) return null;
  return (
    <section aria-label="What would free it" className="mt-2">
      <h3 className="font-semibold">What would free it</h3>
      <ul>
        {pass.wouldFree.map((way, index) => {
          const edits = Edits.safeParse(way.edits);
          return (
            <li
              key={index}
              className="flex items-center gap-2 border-t border-line-soft py-1.5 first:border-t-0"
            >
              <span className="min-w-0 flex-1">{way.words}</span>
              {edits.success && allows('edit') && (
                <Button size="small" disabled={isBusy} onClick={() => apply(edits.data, way.words)}>
                  Do this
                </Button>
              )}
            </li>
          );
        })}
      </ul>
    </section>
  );
}
