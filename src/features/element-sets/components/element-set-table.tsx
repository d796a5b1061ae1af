import type { ElementSet } from '../../../../shared/schemas/element-set.ts';
import { MissionMark } from '../../../components/mission-mark.tsx';
import { ElementStateChip } from '../../../components/state-chips.tsx';
import { Cell, Head, RowHead, Table } from '../../../components/table.tsx';
import { useMissions } from '../../../hooks/use-missions.ts';
import { useSorted } from '../../../hooks/use-sorted.ts';
import { classNames } from '../../../lib/class-names.ts';
import { dateClock } from '../../../lib/format-time.ts';
import { ElementSetAge } from './element-set-age.tsx';

interface Props {
  sets: readonly ElementSet[];
  chosenId: string | null;
  /** Left out where every row would say the same. */
  withState: boolean;
  onChoose: (id: string) => void;
}

const ORDERS = {
  satellite: (set: ElementSet) => set.satelliteName ?? set.name ?? '',
  epoch: (set: ElementSet) => set.epochUtc,
  age: (set: ElementSet) => set.ageHours,
  uploaded: (set: ElementSet) => set.uploadedUtc,
};

export function ElementSetTable({ sets, chosenId, withState, onChoose }: Props) {
  const missions = useMissions();
  const { rows, sortOf } = useSorted(sets, ORDERS, { by: 'age', descending: true });
  return (
    <Table caption="Element sets" fill>
      <thead>
        <tr>
          <Head {...sortOf('satellite')}>Satellite</Head>
          <Head>Catalogue number</Head>
          {withState && <Head>State</Head>}
          <Head {...sortOf('age')}>Age</Head>
          <Head {...sortOf('epoch')}>Epoch UTC</Head>
          <Head {...sortOf('uploaded')}>Uploaded UTC</Head>
          <Head>By</Head>
        </tr>
      </thead>
      <tbody>
        {rows.map((set) => (
          <tr
            key={set.id}
            className={classNames(set.id === chosenId ? 'bg-accent-soft' : 'hover:bg-raised')}
          >
            <RowHead>
              <span className="flex items-center gap-2">
                <MissionMark series={missions.series(set.missionId)} />
                <button
                  type="button"
                  className="min-h-6 rounded-mark hover:underline"
                  aria-expanded={set.id === chosenId}
                  onClick={() => onChoose(set.id)}
                >
                  {set.satelliteName ?? set.name ?? 'Unknown satellite'}
                </button>
              </span>
            </RowHead>
            <Cell className="font-mono text-mono">{set.catalogNumber}</Cell>
            {withState && (
              <Cell>
                <ElementStateChip state={set.state} />
              </Cell>
            )}
            <Cell>
              <ElementSetAge hours={set.ageHours} />
            </Cell>
            <Cell>{dateClock(Date.parse(set.epochUtc))}</Cell>
            <Cell muted>{dateClock(Date.parse(set.uploadedUtc))}</Cell>
            <Cell muted>{set.uploadedBy}</Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
