import type { ElementSetUpload } from '../../../../shared/schemas/element-set.ts';
import { Button } from '../../../components/button.tsx';
import { Icon } from '../../../components/icon.tsx';
import { Panel } from '../../../components/panel.tsx';
import { useAnnounce } from '../../../components/announcer.tsx';
import { counted } from '../../../lib/format-number.ts';
import { titleOfRefusal } from '../refusal-titles.ts';

type Refused = ElementSetUpload['refused'][number];

interface Props {
  refused: readonly Refused[];
  /** The file's own lines; null for an upload of the past, whose text is not kept in the browser. */
  fileLines: readonly string[] | null;
  noun?: string;
}

const asText = (refused: readonly Refused[]): string =>
  refused
    .map((one) => `line ${one.line}, column ${one.column}: ${one.code}: ${one.reason}`)
    .join('\n');

/** What is refused, with line, column, the text, the rule and the remedy. */
export function RefusedSets({ refused, fileLines, noun = 'set' }: Props) {
  const announce = useAnnounce();
  const copy = (): void => {
    void navigator.clipboard.writeText(asText(refused)).then(
      () => announce('The list of refusals is on the clipboard.'),
      () => announce('The browser did not allow copying.', { tone: 'danger' }),
    );
  };
  return (
    <Panel
      title="Refused"
      aside={counted(refused.length, noun)}
      flush
      actions={
        <Button size="small" variant="quiet" onClick={copy}>
          Copy as text
        </Button>
      }
    >
      <ul>
        {refused.map((one, index) => (
          <li key={index} className="border-t border-line-soft px-4 py-2.5">
            <div className="flex flex-wrap items-baseline gap-x-2">
              <Icon name="needsAttention" className="self-center text-danger-mark" />
              <span className="font-semibold">
                Line {one.line}, column {one.column}
              </span>
              <span className="ml-auto font-semibold">{titleOfRefusal(one.code)}</span>
            </div>
            <MarkedLine text={fileLines?.[one.line - 1]} column={one.column} />
            <p className="mt-1.5 text-ink-muted">
              {one.reason} <span className="font-mono text-caption">{one.code}</span>
            </p>
          </li>
        ))}
      </ul>
    </Panel>
  );
}

/** The line as it stands in the file; what begins at the faulty column is underlined. */
function MarkedLine({ text, column }: { text: string | undefined; column: number }) {
  if (text === undefined || text === '') return null;
  const from = Math.max(0, Math.min(column - 1, text.length - 1));
  const rest = text.slice(from);
  const faulty = /^\s*\S+/.exec(rest)?.[0] ?? rest;
  return (
    <pre
      tabIndex={0}
      aria-label="The line in the file"
      className="mt-1.5 overflow-x-auto rounded-mark bg-raised px-2.5 py-1.5 font-mono text-table"
    >
      {text.slice(0, from)}
      <mark className="border-b-2 border-danger-mark bg-danger-soft font-semibold text-danger-text">
        {faulty}
      </mark>
      {text.slice(from + faulty.length)}
    </pre>
  );
}
