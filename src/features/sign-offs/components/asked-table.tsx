import type { RequirementResult } from '../../../../shared/schemas/requirement.ts';
import { Icon } from '../../../components/icon.tsx';
import { EmptyState } from '../../../components/states.tsx';
import { Cell, Head, RowHead, Table } from '../../../components/table.tsx';
import { decimals, MISSING } from '../../../lib/format-number.ts';
import { seriesColor } from '../../../lib/series.ts';

interface Props {
  results: readonly RequirementResult[];
  series: number | null;
}

const digits = (unit: string): number => (unit === 'contacts' ? 0 : 1);
const isGap = (result: RequirementResult): boolean => result.label.startsWith('Longest gap');

/** The short ones on top, the overrun in red and with its reason. */
export function AskedTable({ results, series }: Props) {
  if (results.length === 0)
    return (
      <EmptyState icon="info" title="No requirement line applies to this day">
        The mission’s passes are served where there is room.
      </EmptyState>
    );
  const rows = results.toSorted((a, b) => Number(a.met) - Number(b.met));
  return (
    <Table caption="Requirements of the day">
      <thead>
        <tr>
          <Head>
            <span className="sr-only">Met</span>
          </Head>
          <Head>Requirement</Head>
          <Head num>Asked</Head>
          <Head num>Plan gives</Head>
          <Head className="w-40">
            <span className="sr-only">Picture</span>
          </Head>
          <Head>Note</Head>
        </tr>
      </thead>
      <tbody>
        {rows.map((one) => (
          <tr key={`${one.requirementId} ${one.satelliteId ?? ''}`}>
            <Cell>
              <Icon
                name={one.met ? 'approve' : 'needsAttention'}
                label={one.met ? 'met' : 'short'}
                className={one.met ? 'text-ok-mark' : 'text-danger-mark'}
              />
            </Cell>
            <RowHead>{one.label}</RowHead>
            <Cell num muted>
              {isGap(one) ? 'at most' : 'at least'} {decimals(one.asked, digits(one.unit))}{' '}
              {one.unit}
            </Cell>
            <Cell num strong>
              {one.given === null ? MISSING : decimals(one.given, digits(one.unit))}
            </Cell>
            <Cell>
              <Bar
                result={one}
                color={series === null ? 'var(--ink-muted)' : seriesColor(series)}
              />
            </Cell>
            <Cell muted>{one.note}</Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

const WIDTH = 150;

/** What is given as a bar, what was asked as a stroke on it; an overrun of a gap is red. */
function Bar({ result, color }: { result: RequirementResult; color: string }) {
  const { asked, given } = result;
  if (asked === null || given === null) return null;
  const most = Math.max(asked, given) * 1.15 || 1;
  const x = (value: number): number => (value / most) * WIDTH;
  return (
    <svg width={WIDTH} height="14" aria-hidden="true" className="block">
      <rect x="0" y="4" width={WIDTH} height="6" fill="var(--sunken)" />
      <rect x="0" y="4" width={x(given)} height="6" fill={color} />
      {isGap(result) && given > asked && (
        <rect x={x(asked)} y="4" width={x(given) - x(asked)} height="6" fill="var(--danger-mark)" />
      )}
      <path d={`M${x(asked)} 1v12`} stroke="var(--ink)" strokeWidth="1.5" />
    </svg>
  );
}
