import { zodResolver } from '@hookform/resolvers/zod';
import { useId } from 'react';
import { FormProvider, useForm, useFormContext, useWatch } from 'react-hook-form';
import type { Satellite } from '../../../../shared/schemas/satellite.ts';
import { Button } from '../../../components/button.tsx';
import { CheckField, SelectField, TextField } from '../../../components/field.tsx';
import { ErrorNote } from '../../../components/states.tsx';
import { useMissions } from '../../../hooks/use-missions.ts';
import { asNumber, showFieldErrors } from '../../../lib/form-errors.ts';
import { LinkFields } from './link-fields.tsx';
import {
  FIELDSET,
  GRID,
  SatelliteFormSchema,
  newLink,
  valuesOf,
  type SatelliteBody,
  type SatelliteValues,
} from './satellite-form-parts.ts';

interface Props {
  satellite: Satellite | null;
  busy: boolean;
  readOnly: boolean;
  onSave: (body: SatelliteBody, onError: (error: unknown) => void) => void;
  error: unknown;
}

export function SatelliteForm({ satellite, busy, readOnly, onSave, error }: Props) {
  const form = useForm<SatelliteValues, unknown, SatelliteBody>({
    resolver: zodResolver(SatelliteFormSchema),
    // Empty number fields hold null until they are filled; the schema refuses them on saving.
    defaultValues: valuesOf(satellite) as SatelliteValues,
    disabled: readOnly,
  });
  const { handleSubmit, setError, formState } = form;
  return (
    <FormProvider {...form}>
      <form
        noValidate
        className="flex flex-col gap-3.5"
        onSubmit={(event) =>
          void handleSubmit((body) =>
            onSave(body, (failure) => void showFieldErrors(failure, setError)),
          )(event)
        }
      >
        <NameFields />
        <LinkFields name="downlink" title="Downlink" />
        <UplinkSection />
        <PlanningFields withRetired={satellite !== null} />
        <ErrorNote error={error} />
        {!readOnly && (
          <div className="flex justify-end">
            <Button
              type="submit"
              variant="primary"
              busy={busy}
              disabled={satellite !== null && !formState.isDirty}
            >
              {satellite ? 'Save the changes' : 'Add the satellite'}
            </Button>
          </div>
        )}
      </form>
    </FormProvider>
  );
}

function NameFields() {
  const { register, formState } = useFormContext<SatelliteValues>();
  const missions = useMissions();
  const { errors } = formState;
  return (
    <fieldset className={FIELDSET}>
      <legend className="sr-only">Name and mission</legend>
      <div className={GRID}>
        <TextField label="Name" error={errors.name?.message} {...register('name')} />
        <SelectField label="Mission" error={errors.missionId?.message} {...register('missionId')}>
          <option value="">Choose a mission</option>
          {missions.list
            .filter(({ retired }) => !retired)
            .map(({ id, name }) => (
              <option key={id} value={id}>
                {name}
              </option>
            ))}
        </SelectField>
        <TextField
          label="Catalogue number"
          inputMode="numeric"
          hint="Five digits, or nine while provisional; empty while there is none"
          error={errors.catalogNumber?.message}
          {...register('catalogNumber', { setValueAs: asNumber })}
        />
      </div>
    </fieldset>
  );
}

function UplinkSection() {
  const { setValue, control, formState } = useFormContext<SatelliteValues>();
  const uplink = useWatch({ control, name: 'uplink' });
  const id = useId();
  const readOnly = formState.disabled;
  const toggle = (on: boolean): void => {
    // As above: empty number fields hold null.
    const empty = { ...newLink, gOverTDbK: null } as unknown as SatelliteValues['uplink'];
    setValue('uplink', on ? empty : null, { shouldDirty: true });
  };
  return (
    <div className="flex flex-col gap-2">
      <div id={id}>
        <CheckField
          label="It has an uplink through this station"
          checked={uplink !== null && uplink !== undefined}
          disabled={readOnly}
          onChange={(event) => toggle(event.target.checked)}
        />
      </div>
      {uplink && <LinkFields name="uplink" title="Uplink" />}
    </div>
  );
}

function PlanningFields({ withRetired }: { withRetired: boolean }) {
  const { register, formState } = useFormContext<SatelliteValues>();
  const { errors } = formState;
  const number = { setValueAs: asNumber };
  return (
    <fieldset className={FIELDSET}>
      <legend className="float-left mb-2 w-full text-section font-semibold">Planning</legend>
      <div className={`${GRID} clear-both`}>
        <TextField
          label="Needed C/I"
          unit="dB"
          inputMode="decimal"
          hint="Empty: as the face demands"
          error={errors.requiredCOverIDb?.message}
          {...register('requiredCOverIDb', number)}
        />
        <TextField
          label="Guard time"
          unit="s"
          inputMode="numeric"
          hint="Empty: as the station has it"
          error={errors.guardTimeSeconds?.message}
          {...register('guardTimeSeconds', number)}
        />
        <TextField
          label="Time uncertainty"
          unit="s"
          inputMode="numeric"
          hint="Widens the channel’s holding on both sides"
          error={errors.timeUncertaintySeconds?.message}
          {...register('timeUncertaintySeconds', number)}
        />
      </div>
      <div className="mt-3 flex flex-col gap-2">
        <CheckField
          label="It transmits always, not only in contacts"
          hint="Then it disturbs beams near it whenever it is above the horizon"
          {...register('transmitsAlways')}
        />
        {withRetired && (
          <CheckField
            label="Retired"
            hint="No passes are predicted any more; past plans keep it"
            {...register('retired')}
          />
        )}
      </div>
    </fieldset>
  );
}
