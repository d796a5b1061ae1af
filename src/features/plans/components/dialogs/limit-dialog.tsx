import { useState } from 'react';
import { useAnnounce } from '../../../../components/announcer.tsx';
import { Button } from '../../../../components/button.tsx';
import { Dialog } from '../../../../components/dialog.tsx';
import { TextField } from '../../../../components/field.tsx';
import { asNumber } from '../../../../lib/form-errors.ts';
import { decimals } from '../../../../lib/format-number.ts';
import { useSetLimitOfDay } from '../../../../queries/plan-queries.ts';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import { Refusal } from './refusal.tsx';

/** The limit by which every check, run, reason and export of the plan goes. */
export function LimitDialog({ onClose }: { onClose: () => void }) {
  const { plan, faces } = usePlanDesk();
  const setLimit = useSetLimitOfDay();
  const announce = useAnnounce();
  const [text, setText] = useState(String(plan.limitOfDayDb));
  const value = asNumber(text);
  const hardEnd = Math.max(...faces.map(({ hardEndDb }) => hardEndDb));
  const isGood = value !== null && value > 0 && value <= hardEnd;
  const send = (): void => {
    if (!isGood) return;
    setLimit.mutate(
      { plan, limitOfDayDb: value },
      {
        onSuccess: () => {
          announce(`The limit of the day is ${decimals(value, 1)} dB.`);
          onClose();
        },
      },
    );
  };
  return (
    <Dialog
      open
      onClose={onClose}
      title="Limit of the day"
      description="Every check, run, reason and export of this plan goes by it. The change is recorded."
      footer={
        <>
          <Button onClick={onClose}>Keep {decimals(plan.limitOfDayDb, 1)} dB</Button>
          <Button
            variant="primary"
            busy={setLimit.isPending}
            disabled={!isGood || value === plan.limitOfDayDb}
            onClick={send}
          >
            Set the limit
          </Button>
        </>
      }
    >
      <TextField
        label="Largest scan loss"
        unit="dB"
        inputMode="decimal"
        className="w-40"
        value={text}
        onChange={(event) => setText(event.target.value)}
        hint={`Hard end of the faces: ${decimals(hardEnd, 1)} dB`}
        error={isGood ? undefined : `Between 0 and ${decimals(hardEnd, 1)} dB`}
      />
      <Refusal error={setLimit.error} />
    </Dialog>
  );
}
