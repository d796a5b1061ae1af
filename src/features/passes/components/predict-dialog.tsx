import { useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import type { Run } from '../../../../shared/schemas/run.ts';
import { Day } from '../../../../shared/schemas/common.ts';
import { dayInterval, toIso } from '../../../../shared/time.ts';
import { Button } from '../../../components/button.tsx';
import { Dialog } from '../../../components/dialog.tsx';
import { SelectField, TextField } from '../../../components/field.tsx';
import { RunProgress } from '../../../components/run-progress.tsx';
import { ErrorNote } from '../../../components/states.tsx';
import { counted } from '../../../lib/format-number.ts';
import { nextDay } from '../../../lib/format-time.ts';
import { passQueries, useStartPrediction } from '../../../queries/pass-queries.ts';

interface Props {
  stationId: string;
  day: string;
  open: boolean;
  onClose: () => void;
}

/** Passes are predicted by themselves after an upload; here on demand, with progress and a way to stop. */
export function PredictDialog({ stationId, day, open, onClose }: Props) {
  const [from, setFrom] = useState(day);
  const [days, setDays] = useState(1);
  const start = useStartPrediction();
  const client = useQueryClient();
  const [over, setOver] = useState<Run | null>(null);
  const isDay = Day.safeParse(from).success;
  const begin = (): void => {
    if (!isDay) return;
    setOver(null);
    start.mutate({
      stationId,
      fromUtc: toIso(dayInterval(from).fromMs),
      toUtc: toIso(dayInterval(nextDay(from, days - 1)).toMs),
    });
  };
  const runId = start.data?.runId;
  return (
    <Dialog
      open={open}
      onClose={onClose}
      title="Predict the passes again"
      description="From the element sets in use, with the station’s mask as it stands."
      footer={
        <>
          <Button onClick={onClose}>{over ? 'Close' : 'Close, let it run'}</Button>
          <Button
            variant="primary"
            busy={start.isPending || (runId !== undefined && over === null)}
            onClick={begin}
          >
            Predict
          </Button>
        </>
      }
    >
      <div className="grid grid-cols-2 gap-4">
        <TextField
          label="From day"
          unit="UTC, as 2026-12-01"
          value={from}
          error={isDay ? undefined : 'Write a day, such as 2026-12-01'}
          onChange={(event) => setFrom(event.target.value)}
        />
        <SelectField
          label="How many"
          value={days}
          onChange={(event) => setDays(Number(event.target.value))}
        >
          {[1, 2, 3, 5, 10].map((count) => (
            <option key={count} value={count}>
              {counted(count, 'day')}
            </option>
          ))}
        </SelectField>
      </div>
      <div className="mt-4 flex flex-col gap-3">
        <ErrorNote error={start.error} />
        {runId && (
          <RunProgress
            runId={runId}
            onOver={(run) => {
              setOver(run);
              void client.invalidateQueries({ queryKey: passQueries.all });
            }}
          />
        )}
      </div>
    </Dialog>
  );
}
