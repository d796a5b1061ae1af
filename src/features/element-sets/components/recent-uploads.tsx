import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { Panel } from '../../../components/panel.tsx';
import { QueryView } from '../../../components/query-view.tsx';
import { EmptyState } from '../../../components/states.tsx';
import { Cell, Head, RowHead, Table } from '../../../components/table.tsx';
import { bytes } from '../../../lib/format-number.ts';
import { dateClock } from '../../../lib/format-time.ts';
import { elementSetQueries } from '../../../queries/element-set-queries.ts';

export function RecentUploads() {
  const uploads = useQuery(elementSetQueries.uploads());
  return (
    <Panel title="Uploaded files" aside="newest first" flush>
      <QueryView
        query={uploads}
        what="The uploaded files"
        isEmpty={(data) => data.length === 0}
        empty={<EmptyState icon="file" title="No file was uploaded yet" />}
      >
        {(data) => (
          <Table caption="Uploaded files, newest first">
            <thead>
              <tr>
                <Head>File</Head>
                <Head>Uploaded UTC</Head>
                <Head>By</Head>
                <Head num unit="bytes">
                  Size
                </Head>
                <Head num>Accepted</Head>
                <Head num>Refused</Head>
                <Head num>Not in the fleet</Head>
              </tr>
            </thead>
            <tbody>
              {data.map((upload) => (
                <tr key={upload.id}>
                  <RowHead>
                    <Link className="link" to={`/element-sets/upload?upload=${upload.id}`}>
                      {upload.fileName}
                    </Link>
                  </RowHead>
                  <Cell>{dateClock(Date.parse(upload.uploadedUtc))}</Cell>
                  <Cell muted>{upload.uploadedBy}</Cell>
                  <Cell num>{bytes(upload.sizeBytes)}</Cell>
                  <Cell num>{upload.acceptedCount}</Cell>
                  <Cell num className={upload.refusedCount > 0 ? 'font-semibold' : ''}>
                    {upload.refusedCount}
                  </Cell>
                  <Cell num>{upload.unknownCount}</Cell>
                </tr>
              ))}
            </tbody>
          </Table>
        )}
      </QueryView>
    </Panel>
  );
}
