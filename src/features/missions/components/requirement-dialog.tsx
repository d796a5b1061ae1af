import { zodResolver } from '@hookform/resolvers/zod';
import { useForm, useWatch } from 'react-hook-form';
import type { Mission } from '../../../../shared/schemas/mission.ts';
import { CreateRequirement, type Requirement } from '../../../../shared/schemas/requirement.ts';
import { useAnnounce } from '../../../components/announcer.tsx';
import { Button } from '../../../components/button.tsx';
import { Dialog } from '../../../components/dialog.tsx';
import { SelectField, TextField } from '../../../components/field.tsx';
import { ErrorNote } from '../../../components/states.tsx';
import { asNumber, showFieldErrors } from '../../../lib/form-errors.ts';
import { useSaveRequirement } from '../../../queries/mission-queries.ts';
import { UNIT_WORDS } from '../requirement-words.ts';

interface Props {
  mission: Mission;
  line: Requirement | null;
  onClose: () => void;
}

const NEW_LINE: Omit<CreateRequirement, 'missionId'> = {
  appliesTo: 'each',
  stationId: null,
  what: 'contacts',
  least: null,
  most: null,
  minimumDurationSeconds: 180,
  uplink: 'none',
  leastUplinkMinutes: null,
  minimumElevationDeg: null,
  marginFloorDb: null,
  hoursUtc: null,
  weekdays: null,
  scanLossLimitDb: null,
};

const valuesOf = ({ id: _id, version: _version, ...line }: Requirement): CreateRequirement => line;

export function RequirementDialog({ mission, line, onClose }: Props) {
  const save = useSaveRequirement();
  const announce = useAnnounce();
  const { register, handleSubmit, control, formState, setError } = useForm<CreateRequirement>({
    resolver: zodResolver(CreateRequirement),
    defaultValues: line ? valuesOf(line) : { ...NEW_LINE, missionId: mission.id },
  });
  const what = useWatch({ control, name: 'what' });
  const unit = UNIT_WORDS[what];
  const number = { setValueAs: asNumber };
  const errors = formState.errors;
  const submit = (body: CreateRequirement): void =>
    save.mutate(
      { line, body },
      {
        onError: (failure) => void showFieldErrors(failure, setError),
        onSuccess: () => {
          announce('The requirement line is saved.');
          onClose();
        },
      },
    );
  return (
    <Dialog
      open
      wide
      onClose={onClose}
      title={line ? 'Change the requirement line' : `A requirement line of ${mission.name}`}
      description="Asked of every day’s plan. Open rounds of sign-off keep the copy they began with."
    >
      <form
        noValidate
        className="flex flex-col gap-3.5"
        onSubmit={(event) => void handleSubmit(submit)(event)}
      >
        <div className="grid grid-cols-2 gap-3 md:grid-cols-4">
          <SelectField label="What" {...register('what')}>
            <option value="contacts">Contacts</option>
            <option value="minutes">Contact time</option>
            <option value="gap">Longest gap</option>
            <option value="volume">Volume</option>
          </SelectField>
          <SelectField label="For" {...register('appliesTo')}>
            <option value="each">each satellite</option>
            <option value="together">all together</option>
          </SelectField>
          <TextField
            label="Least a day"
            unit={unit}
            inputMode="decimal"
            disabled={what === 'gap'}
            error={errors.least?.message}
            {...register('least', number)}
          />
          <TextField
            label={what === 'gap' ? 'Longest' : 'Most a day'}
            unit={unit}
            inputMode="decimal"
            error={errors.most?.message}
            {...register('most', number)}
          />
        </div>
        <fieldset className="grid grid-cols-2 gap-3 md:grid-cols-3">
          <legend className="mb-1.5 text-table font-semibold">A contact counts when</legend>
          <TextField
            label="It lasts at least"
            unit="s"
            inputMode="numeric"
            error={errors.minimumDurationSeconds?.message}
            {...register('minimumDurationSeconds', number)}
          />
          <SelectField label="Uplink" {...register('uplink')}>
            <option value="none">none</option>
            <option value="wanted">wanted</option>
            <option value="required">required</option>
          </SelectField>
          <TextField
            label="Uplink lasts"
            unit="min"
            inputMode="decimal"
            error={errors.leastUplinkMinutes?.message}
            {...register('leastUplinkMinutes', number)}
          />
          <TextField
            label="It reaches"
            unit="deg"
            inputMode="decimal"
            hint="Highest elevation; empty: any"
            error={errors.minimumElevationDeg?.message}
            {...register('minimumElevationDeg', number)}
          />
          <TextField
            label="Scan loss within"
            unit="dB"
            inputMode="decimal"
            hint="Empty: the limit of the day"
            error={errors.scanLossLimitDb?.message}
            {...register('scanLossLimitDb', number)}
          />
          <TextField
            label="Link margin"
            unit="dB"
            inputMode="decimal"
            error={errors.marginFloorDb?.message}
            {...register('marginFloorDb', number)}
          />
        </fieldset>
        <ErrorNote error={save.error} />
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>Keep as it is</Button>
          <Button type="submit" variant="primary" busy={save.isPending}>
            {line ? 'Save the changes' : 'Add the line'}
          </Button>
        </div>
      </form>
    </Dialog>
  );
}
