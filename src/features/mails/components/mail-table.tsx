import type { Mail } from '../../../../shared/schemas/audit-event.ts';
import { Chip } from '../../../components/chip.tsx';
import { Panel } from '../../../components/panel.tsx';
import { Cell, Head, RowHead, Table } from '../../../components/table.tsx';
import { classNames } from '../../../lib/class-names.ts';
import { dateClock } from '../../../lib/format-time.ts';

interface Props {
  mails: readonly Mail[];
  chosenId: string | null;
  onChoose: (id: string) => void;
}

export function MailTable({ mails, chosenId, onChoose }: Props) {
  return (
    <Table caption="Mails" fill>
      <thead>
        <tr>
          <Head>Subject</Head>
          <Head>To</Head>
          <Head unit="UTC">Written</Head>
          <Head>State</Head>
        </tr>
      </thead>
      <tbody>
        {mails.map((mail) => (
          <tr
            key={mail.id}
            className={classNames(mail.id === chosenId ? 'bg-accent-soft' : 'hover:bg-raised')}
          >
            <RowHead className="font-normal">
              <button
                type="button"
                aria-pressed={mail.id === chosenId}
                className="rounded-mark text-left font-semibold hover:underline"
                onClick={() => onChoose(mail.id)}
              >
                {mail.subject}
              </button>
            </RowHead>
            <Cell>{mail.toAddress}</Cell>
            <Cell className="figures whitespace-nowrap">
              {dateClock(Date.parse(mail.createdUtc))}
            </Cell>
            <Cell>
              <MailState mail={mail} />
            </Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

function MailState({ mail }: { mail: Mail }) {
  if (mail.state === 'sent')
    return (
      <Chip tone="ok" icon="approve">
        Sent
      </Chip>
    );
  return (
    <Chip tone={mail.attempts > 0 ? 'warn' : 'info'} icon="clock">
      {mail.attempts > 0 ? `Waiting, tried ${mail.attempts}×` : 'Waiting'}
    </Chip>
  );
}

export function MailLetter({ mail }: { mail: Mail }) {
  return (
    <Panel title={mail.subject} aside={`to ${mail.toAddress}`}>
      <p className="text-body whitespace-pre-wrap">{mail.body}</p>
      {mail.lastError && (
        <p className="mt-3 text-table text-warn-text">Last answer: {mail.lastError}</p>
      )}
    </Panel>
  );
}
