import type { Interval } from '../../../../../shared/time.ts';
import { Button } from '../../../../components/button.tsx';
import { SelectField, TextField } from '../../../../components/field.tsx';
import { clockSeconds } from '../../../../lib/format-time.ts';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import type { PlanColumn } from '../../model/columns.ts';
import { instantNear } from '../../model/near-clock.ts';

/** One leg as the fields hold it: texts, so that half a time can stand there while it is typed. */
export interface LegDraft {
  channelId: string;
  from: string;
  to: string;
}

export const draftOf = (channelId: string, interval: Interval): LegDraft => ({
  channelId,
  from: clockSeconds(interval.fromMs),
  to: clockSeconds(interval.toMs),
});

/** The interval a draft means; null while one of its times is no time. */
export function intervalOf(draft: LegDraft, near: Interval): Interval | null {
  const fromMs = instantNear(draft.from, near.fromMs);
  const toMs = instantNear(draft.to, near.toMs);
  return fromMs === null || toMs === null || toMs <= fromMs ? null : { fromMs, toMs };
}

interface Props {
  legend: string;
  direction: 'receive' | 'transmit';
  faceId: string;
  draft: LegDraft;
  onChange: (draft: LegDraft) => void;
  /** Where the leg may lie; offered as the longest choice. */
  window: Interval | null;
  near: Interval;
  autoFocus?: 'channel' | 'times' | undefined;
  /** Word of the choice of no leg. */
  none?: string;
}

export function LegFields(props: Props) {
  const { legend, direction, faceId, draft, onChange, window, near, autoFocus, none } = props;
  const { columns } = usePlanDesk();
  const fitting = [...columns.values()].filter(
    ({ channel, face }) => channel.direction === direction && face.id === faceId,
  );
  const isTime = (text: string, ms: number): boolean => instantNear(text, ms) !== null;
  const interval = intervalOf(draft, near);
  return (
    <fieldset>
      <legend className="mb-1 text-body font-semibold">{legend}</legend>
      <div className="grid grid-cols-[1fr_6.5rem_6.5rem] items-start gap-3">
        <SelectField
          label="Channel"
          value={draft.channelId}
          autoFocus={autoFocus === 'channel'}
          onChange={(event) => onChange({ ...draft, channelId: event.target.value })}
        >
          {none !== undefined && <option value="">{none}</option>}
          {fitting.map((column) => (
            <option key={column.id} value={column.id}>
              {optionWords(column)}
            </option>
          ))}
        </SelectField>
        <TextField
          label="From"
          unit="UTC"
          className="figures"
          value={draft.from}
          disabled={draft.channelId === ''}
          autoFocus={autoFocus === 'times'}
          error={isTime(draft.from, near.fromMs) ? undefined : 'As 09:37:50'}
          onChange={(event) => onChange({ ...draft, from: event.target.value })}
        />
        <TextField
          label="To"
          unit="UTC"
          className="figures"
          value={draft.to}
          disabled={draft.channelId === ''}
          error={
            isTime(draft.to, near.toMs)
              ? interval
                ? undefined
                : 'Ends before it begins'
              : 'As 09:42:50'
          }
          onChange={(event) => onChange({ ...draft, to: event.target.value })}
        />
      </div>
      {window && draft.channelId !== '' && (
        <p className="figures mt-1 flex items-center gap-2 text-caption text-ink-muted">
          Usable {clockSeconds(window.fromMs)}–{clockSeconds(window.toMs)}
          <Button
            size="small"
            variant="quiet"
            className="min-h-6! text-caption! text-accent!"
            onClick={() => onChange(draftOf(draft.channelId, inward(window)))}
          >
            Take all of it
          </Button>
        </p>
      )}
    </fieldset>
  );
}

/** Legs are whole seconds, rounded into their window. */
export const inward = ({ fromMs, toMs }: Interval): Interval => ({
  fromMs: Math.ceil(fromMs / 1000) * 1000,
  toMs: Math.floor(toMs / 1000) * 1000,
});

const optionWords = ({ channel, closed }: PlanColumn): string =>
  `${channel.label}${closed.length > 0 ? ', closed for a time' : ''}`;
