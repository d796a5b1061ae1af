import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { NextContact, OperationalChange } from '../../../../shared/schemas/edit.ts';
import type { Plan } from '../../../../shared/schemas/plan.ts';
import type { Station } from '../../../../shared/schemas/station.ts';
import { useAnnounce } from '../../../components/announcer.tsx';
import { Button } from '../../../components/button.tsx';
import { ToneWord } from '../../../components/chip.tsx';
import { Dialog } from '../../../components/dialog.tsx';
import { CheckField, SelectField, TextField } from '../../../components/field.tsx';
import { QueryView } from '../../../components/query-view.tsx';
import { EmptyState, ErrorNote } from '../../../components/states.tsx';
import { useNow } from '../../../hooks/use-now.ts';
import { degrees } from '../../../lib/format-number.ts';
import { clockSpan, relativeTime } from '../../../lib/format-time.ts';
import { planQueries, useOperatePlan } from '../../../queries/plan-queries.ts';
import { satelliteQueries } from '../../../queries/satellite-queries.ts';

interface Props {
  station: Station;
  plans: readonly Plan[];
  labelOf: (id: string) => string;
  onClose: () => void;
}

/** The next contact for a satellite: choose it, say why, take the chance; from call to released plan in one dialog. */
export function UrgentDialog({ station, plans, labelOf, onClose }: Props) {
  const satellites = useQuery(satelliteQueries.list());
  const [satelliteId, setSatelliteId] = useState('');
  const [needsUplink, setNeedsUplink] = useState(false);
  const [reason, setReason] = useState('');
  const [caller, setCaller] = useState('');
  const [isEmergency, setEmergency] = useState(false);
  const chances = useQuery({
    ...planQueries.nextContacts(satelliteId, station.id, needsUplink),
    enabled: satelliteId !== '',
  });
  const operate = useOperatePlan();
  const announce = useAnnounce();
  const take = (chance: NextContact): void => {
    const plan = plans.find((one) => one.id === chance.planId);
    const change = changeOf(chance, { reason, caller, isEmergency });
    if (!plan || !change) return;
    operate.mutate(
      { plan, change },
      {
        onSuccess: ({ revision }) => {
          announce(`The urgent contact is in force, revision ${revision}.`);
          onClose();
        },
      },
    );
  };
  return (
    <Dialog
      open
      wide
      onClose={onClose}
      title="Urgent contact"
      description="The next windows of a satellite, soonest first. Taking one is in force at once."
    >
      <div className="flex flex-col gap-3.5">
        <div className="grid grid-cols-2 gap-3">
          <SelectField
            label="Satellite"
            value={satelliteId}
            onChange={(event) => setSatelliteId(event.target.value)}
          >
            <option value="">Choose a satellite</option>
            {satellites.data
              ?.filter((one) => !one.retired)
              .map(({ id, name }) => (
                <option key={id} value={id}>
                  {name}
                </option>
              ))}
          </SelectField>
          <TextField
            label="Reason"
            value={reason}
            onChange={(event) => setReason(event.target.value)}
          />
          <TextField
            label="Caller"
            value={caller}
            onChange={(event) => setCaller(event.target.value)}
          />
          <div className="flex flex-col justify-end gap-2">
            <CheckField
              label="With an uplink"
              checked={needsUplink}
              onChange={(event) => setNeedsUplink(event.target.checked)}
            />
            <CheckField
              label="Spacecraft emergency"
              hint="Only then other contacts give way"
              checked={isEmergency}
              onChange={(event) => setEmergency(event.target.checked)}
            />
          </div>
        </div>
        <ErrorNote error={operate.error} />
        {satelliteId !== '' && (
          <QueryView
            query={chances}
            what="The next windows"
            isEmpty={(list) => list.length === 0}
            empty={<EmptyState title="No usable window today or tomorrow" />}
          >
            {(list) => (
              <ul className="flex flex-col">
                {list.map((chance) => (
                  <ChanceRow
                    key={`${chance.passId} ${chance.faceId} ${chance.fromUtc}`}
                    chance={chance}
                    labelOf={labelOf}
                    isReady={
                      reason.trim().length >= 3 &&
                      plans.some((one) => one.id === chance.planId) &&
                      (chance.displaces.length === 0 || isEmergency)
                    }
                    busy={operate.isPending}
                    onTake={() => take(chance)}
                  />
                ))}
              </ul>
            )}
          </QueryView>
        )}
      </div>
    </Dialog>
  );
}

const changeOf = (
  chance: NextContact,
  { reason, caller, isEmergency }: { reason: string; caller: string; isEmergency: boolean },
): OperationalChange | null =>
  chance.receiveChannelId === null
    ? null
    : {
        kind: 'add-urgent',
        passId: chance.passId,
        receive: {
          channelId: chance.receiveChannelId,
          fromUtc: chance.fromUtc,
          toUtc: chance.toUtc,
        },
        transmit:
          chance.transmitChannelId && chance.transmitFromUtc && chance.transmitToUtc
            ? {
                channelId: chance.transmitChannelId,
                fromUtc: chance.transmitFromUtc,
                toUtc: chance.transmitToUtc,
              }
            : null,
        displaces: chance.displaces.map(({ id }) => id),
        spacecraftEmergency: isEmergency,
        reason,
        caller,
      };

function ChanceRow({
  chance,
  labelOf,
  isReady,
  busy,
  onTake,
}: {
  chance: NextContact;
  labelOf: (id: string) => string;
  isReady: boolean;
  busy: boolean;
  onTake: () => void;
}) {
  const now = useNow();
  const fromMs = Date.parse(chance.fromUtc);
  const isPlanned = /planned already/.test(chance.words);
  return (
    <li className="flex flex-wrap items-center gap-3 border-b border-line-soft py-2 last:border-b-0">
      <span className="figures w-40 text-table font-semibold">
        {clockSpan(fromMs, Date.parse(chance.toUtc))}
        <span className="block text-caption font-normal text-ink-muted">
          {relativeTime(fromMs, now)}, max {degrees(chance.maxElevationDeg)}
        </span>
      </span>
      <span className="min-w-0 flex-1 text-table">
        {chance.words}
        {chance.displaces.length > 0 && (
          <ToneWord tone="warn" icon="warning" className="block">
            gives way: {chance.displaces.map((one) => one.satelliteName).join(', ')}
          </ToneWord>
        )}
      </span>
      {chance.receiveChannelId && !isPlanned && (
        <Button size="small" variant="primary" disabled={!isReady} busy={busy} onClick={onTake}>
          Take it on {labelOf(chance.receiveChannelId)}
        </Button>
      )}
    </li>
  );
}
