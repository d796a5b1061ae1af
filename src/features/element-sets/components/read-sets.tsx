import type { ElementSetUpload } from '../../../../shared/schemas/element-set.ts';
import { Chip } from '../../../components/chip.tsx';
import { Panel } from '../../../components/panel.tsx';
import { Cell, Head, RowHead, Table } from '../../../components/table.tsx';
import { counted } from '../../../lib/format-number.ts';
import { dateClockSeconds } from '../../../lib/format-time.ts';

/** Every set that was read, line by line: accepted, unchanged, or of a satellite that is not in the fleet. */
export function ReadSets({
  upload,
  satelliteName,
}: {
  upload: ElementSetUpload;
  satelliteName: (id: string | null) => string | null;
}) {
  const rows = [
    ...upload.accepted.map((set) => ({ ...set, isUnknown: false })),
    ...upload.unknown.map((set) => ({
      ...set,
      isUnknown: true,
      satelliteId: null,
      unchanged: false,
    })),
  ].sort((a, b) => a.line - b.line);
  if (rows.length === 0) return null;
  return (
    <Panel title="Read" aside={counted(rows.length, 'set')} flush>
      <Table caption="Sets that were read, in the order of the file">
        <thead>
          <tr>
            <Head num>Line</Head>
            <Head>Satellite</Head>
            <Head>Catalogue number</Head>
            <Head>Epoch UTC</Head>
            <Head>Outcome</Head>
          </tr>
        </thead>
        <tbody>
          {rows.map((set) => (
            <tr key={`${set.line} ${set.catalogNumber}`}>
              <Cell num muted>
                {set.line}
              </Cell>
              <RowHead>{satelliteName(set.satelliteId) ?? set.name ?? '–'}</RowHead>
              <Cell className="font-mono text-mono">{set.catalogNumber}</Cell>
              <Cell>{dateClockSeconds(Date.parse(set.epochUtc))}</Cell>
              <Cell>
                <Outcome unknown={set.isUnknown} unchanged={set.unchanged} />
              </Cell>
            </tr>
          ))}
        </tbody>
      </Table>
    </Panel>
  );
}

function Outcome({ unknown, unchanged }: { unknown: boolean; unchanged: boolean }) {
  if (unknown)
    return (
      <Chip tone="warn" icon="hash">
        Not in the fleet, kept unassigned
      </Chip>
    );
  if (unchanged)
    return (
      <Chip tone="neutral" icon="duplicate">
        Unchanged
      </Chip>
    );
  return (
    <Chip tone="ok" icon="approve">
      Accepted
    </Chip>
  );
}
