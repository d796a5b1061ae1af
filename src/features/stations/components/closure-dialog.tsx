import { useQuery } from '@tanstack/react-query';
import { useState, type SyntheticEvent } from 'react';
import { CreateClosure, type Closure } from '../../../../shared/schemas/channel.ts';
import type { Station } from '../../../../shared/schemas/station.ts';
import { toIso } from '../../../../shared/time.ts';
import { useAnnounce } from '../../../components/announcer.tsx';
import { Button } from '../../../components/button.tsx';
import { Dialog } from '../../../components/dialog.tsx';
import { CheckField, SelectField, TextAreaField, TextField } from '../../../components/field.tsx';
import { Icon, type IconName } from '../../../components/icon.tsx';
import { QueryView } from '../../../components/query-view.tsx';
import { ErrorNote } from '../../../components/states.tsx';
import { useNow } from '../../../hooks/use-now.ts';
import { asNumber } from '../../../lib/form-errors.ts';
import { MINUTE_MS } from '../../../../shared/time.ts';
import { stationQueries, useCreateClosure } from '../../../queries/station-queries.ts';

interface Props {
  station: Station;
  onClose: () => void;
}

/** Closes something; then shows which contacts that hits, each with what could be done. */
export function ClosureDialog({ station, onClose }: Props) {
  const [made, setMade] = useState<Closure | null>(null);
  return (
    <Dialog
      open
      onClose={onClose}
      title={made ? 'Closed' : 'Add a closure'}
      description={
        made
          ? 'Contacts that it hits are marked on their plans; nothing on a plan is edited by it.'
          : 'A closure is a fact: it is always accepted.'
      }
    >
      {made ? (
        <Hits closure={made} onClose={onClose} />
      ) : (
        <ClosureForm station={station} onClose={onClose} onMade={setMade} />
      )}
    </Dialog>
  );
}

const minute = (ms: number): string => toIso(ms).slice(0, 16);
const toUtc = (text: string): string => (text ? `${text}:00.000Z` : '');

function ClosureForm({ station, onClose, onMade }: Props & { onMade: (closure: Closure) => void }) {
  const now = useNow(MINUTE_MS);
  const faces = useQuery(stationQueries.faces(station.id));
  const channels = useQuery(stationQueries.channels(station.id));
  const create = useCreateClosure();
  const announce = useAnnounce();
  const [what, setWhat] = useState(`station ${station.id}`);
  const [direction, setDirection] = useState('both');
  const [from, setFrom] = useState(minute(now));
  const [to, setTo] = useState('');
  const [isOpenEnded, setOpenEnded] = useState(false);
  const [reduced, setReduced] = useState('');
  const [reason, setReason] = useState('');
  const [errors, setErrors] = useState<Record<string, string>>({});
  const submit = (event: SyntheticEvent): void => {
    event.preventDefault();
    const [scope, scopeId] = what.split(' ');
    const checked = CreateClosure.safeParse({
      scope,
      scopeId,
      direction,
      fromUtc: toUtc(from),
      toUtc: isOpenEnded ? null : toUtc(to),
      reducedByDb: asNumber(reduced),
      reason,
    });
    if (!checked.success) {
      setErrors(
        Object.fromEntries(checked.error.issues.map((one) => [String(one.path[0]), one.message])),
      );
      return;
    }
    create.mutate(checked.data, {
      onSuccess: (closure) => {
        announce('The closure is in force.');
        onMade(closure);
      },
    });
  };
  return (
    <form noValidate className="flex flex-col gap-3.5" onSubmit={submit}>
      <div className="grid grid-cols-2 gap-3">
        <SelectField label="What" value={what} onChange={(event) => setWhat(event.target.value)}>
          <option value={`station ${station.id}`}>Whole station</option>
          {faces.data?.map(({ id, label }) => (
            <option key={id} value={`face ${id}`}>
              {label}
            </option>
          ))}
          {channels.data?.map(({ id, label }) => (
            <option key={id} value={`channel ${id}`}>
              Channel {label}
            </option>
          ))}
        </SelectField>
        <SelectField
          label="Direction"
          value={direction}
          onChange={(event) => setDirection(event.target.value)}
        >
          <option value="both">receive and transmit</option>
          <option value="receive">receive</option>
          <option value="transmit">transmit</option>
        </SelectField>
        <TextField
          label="From"
          unit="UTC"
          type="datetime-local"
          value={from}
          onChange={(event) => setFrom(event.target.value)}
          error={errors.fromUtc && 'Say from when'}
        />
        <TextField
          label="To"
          unit="UTC"
          type="datetime-local"
          value={to}
          disabled={isOpenEnded}
          onChange={(event) => setTo(event.target.value)}
          error={errors.toUtc && (to ? errors.toUtc : 'Say until when, or until further notice')}
        />
      </div>
      <CheckField
        label="Until further notice"
        checked={isOpenEnded}
        onChange={(event) => setOpenEnded(event.target.checked)}
      />
      <TextField
        label="Only reduced, by"
        unit="dB"
        inputMode="decimal"
        hint="Empty: out of service"
        value={reduced}
        onChange={(event) => setReduced(event.target.value)}
        error={errors.reducedByDb}
      />
      <TextAreaField
        label="Reason"
        value={reason}
        onChange={(event) => setReason(event.target.value)}
        error={errors.reason}
      />
      <ErrorNote error={create.error} />
      <div className="flex justify-end gap-2">
        <Button onClick={onClose}>Keep open</Button>
        <Button type="submit" variant="primary" busy={create.isPending}>
          Close it
        </Button>
      </div>
    </form>
  );
}

const HIT_ICON: Record<string, IconName> = {
  lost: 'struck',
  'other-channel': 'move',
  'receive-still-good': 'transmit',
};

function Hits({ closure, onClose }: { closure: Closure; onClose: () => void }) {
  const hits = useQuery(stationQueries.hits(closure.id));
  return (
    <div className="flex flex-col gap-3.5">
      <QueryView
        query={hits}
        what="The contacts that it hits"
        isEmpty={(list) => list.length === 0}
        empty={<p className="text-body">No contact of today or later is hit.</p>}
      >
        {(list) => (
          <ul className="flex flex-col gap-1.5">
            {list.map((hit) => (
              <li key={`${hit.planId} ${hit.contactId}`} className="flex items-start gap-2">
                <Icon
                  name={HIT_ICON[hit.outcome] ?? 'warning'}
                  className={hit.outcome === 'lost' ? 'text-danger-mark' : 'text-warn-mark'}
                />
                <span className="text-body">{hit.words}</span>
              </li>
            ))}
          </ul>
        )}
      </QueryView>
      <div className="flex justify-end">
        <Button variant="primary" onClick={onClose}>
          Done
        </Button>
      </div>
    </div>
  );
}
