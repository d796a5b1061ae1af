import type { OpenPass } from '../../../../shared/schemas/plan.ts';
import { Button } from '../../../components/button.tsx';
import { ToneWord } from '../../../components/chip.tsx';
import { MissionMark } from '../../../components/mission-mark.tsx';
import { EmptyState, Skeleton } from '../../../components/states.tsx';
import { Cell, Head, RowHead, Table } from '../../../components/table.tsx';
import { useSorted } from '../../../hooks/use-sorted.ts';
import { decimals, directionWords } from '../../../lib/format-number.ts';
import { clockSeconds } from '../../../lib/format-time.ts';
import { usePlanDesk } from '../hooks/plan-desk.ts';
import { usePlanEdits } from '../hooks/plan-edits.ts';
import { usePlanView } from '../hooks/plan-view.ts';
import { lookOfPass, toneOfPass } from '../model/reasons.ts';

const STANDING = { free: 0, stopped: 1, unusable: 2 } as const;
const ORDERS = {
  standing: (pass: OpenPass) => STANDING[pass.standing],
  satellite: (pass: OpenPass) => pass.satelliteName,
  aos: (pass: OpenPass) => pass.aosUtc,
  elevation: (pass: OpenPass) => pass.maxElevationDeg,
};

/** Passes that are not on the plan, with reasons; the table view of the left column. */
export function OpenPassTable() {
  const { openPasses } = usePlanDesk();
  if (openPasses === null) return <Skeleton rows={6} />;
  if (openPasses.length === 0)
    return <EmptyState icon="approve" title="Every pass of the day is served" />;
  return <Rows passes={openPasses} />;
}

function Rows({ passes }: { passes: readonly OpenPass[] }) {
  const { rows, sortOf } = useSorted(passes, ORDERS, { by: 'standing' });
  return (
    <Table caption="Passes that are not on the plan">
      <thead>
        <tr>
          <Head {...sortOf('satellite')}>Satellite</Head>
          <Head {...sortOf('aos')}>AOS UTC</Head>
          <Head>LOS</Head>
          <Head num unit="deg" {...sortOf('elevation')}>
            Highest
          </Head>
          <Head>Rises to sets</Head>
          <Head {...sortOf('standing')}>Standing</Head>
          <Head>Why</Head>
          <Head>
            <span className="sr-only">Actions</span>
          </Head>
        </tr>
      </thead>
      <tbody>
        {rows.map((pass) => (
          <OpenPassRow key={pass.passId} pass={pass} />
        ))}
      </tbody>
    </Table>
  );
}

function OpenPassRow({ pass }: { pass: OpenPass }) {
  const { missions, passes, allows } = usePlanDesk();
  const { open } = usePlanEdits();
  const { passId, selectPass } = usePlanView();
  const known = passes.get(pass.passId);
  const { icon, word } = lookOfPass(pass);
  const chosen = passId === pass.passId;
  return (
    <tr className={chosen ? 'bg-accent-soft' : 'hover:bg-raised'}>
      <RowHead className="whitespace-nowrap">
        <span className="flex items-center gap-2">
          <MissionMark series={missions.series(pass.missionId)} />
          <button
            type="button"
            className="min-h-6 rounded-mark text-left hover:underline"
            aria-expanded={chosen}
            onClick={() => selectPass(chosen ? null : pass.passId)}
          >
            {pass.satelliteName}
          </button>
        </span>
      </RowHead>
      <Cell>{clockSeconds(Date.parse(pass.aosUtc))}</Cell>
      <Cell>{clockSeconds(Date.parse(pass.losUtc))}</Cell>
      <Cell num>{decimals(pass.maxElevationDeg, 1)}</Cell>
      <Cell muted className="whitespace-nowrap">
        {known ? directionWords(known) : '–'}
      </Cell>
      <Cell className="whitespace-nowrap">
        <ToneWord tone={toneOfPass(pass)} icon={icon}>
          {word}
        </ToneWord>
      </Cell>
      <Cell muted>{pass.reasons[0]?.message ?? '–'}</Cell>
      <Cell className="text-right">
        {allows('edit') && pass.standing !== 'unusable' && (
          <Button
            size="small"
            aria-label={`Assign ${pass.satelliteName} at ${clockSeconds(Date.parse(pass.aosUtc))}`}
            onClick={() => open({ kind: 'assign', passId: pass.passId })}
          >
            Assign
          </Button>
        )}
      </Cell>
    </tr>
  );
}
