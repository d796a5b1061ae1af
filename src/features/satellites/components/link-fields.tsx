import { useFormContext } from 'react-hook-form';
import { SelectField, TextField } from '../../../components/field.tsx';
import { asNumber } from '../../../lib/form-errors.ts';
import { FIELDSET, GRID, type SatelliteValues } from './satellite-form-parts.ts';

/** Radio data of one direction. */
export function LinkFields({ name, title }: { name: 'downlink' | 'uplink'; title: string }) {
  const { register, formState } = useFormContext<SatelliteValues>();
  const errors = formState.errors[name];
  const number = { setValueAs: asNumber };
  return (
    <fieldset className={FIELDSET}>
      <legend className="float-left mb-2 w-full text-section font-semibold">{title}</legend>
      <div className={`${GRID} clear-both`}>
        <TextField
          label="Frequency"
          unit="MHz"
          inputMode="decimal"
          error={errors?.frequencyMhz?.message}
          {...register(`${name}.frequencyMhz`, number)}
        />
        <TextField
          label="Bandwidth"
          unit="kHz"
          inputMode="decimal"
          error={errors?.bandwidthKhz?.message}
          {...register(`${name}.bandwidthKhz`, number)}
        />
        <SelectField
          label="Polarisation"
          error={errors?.polarisation?.message}
          {...register(`${name}.polarisation`)}
        >
          <option value="rhcp">Right-hand circular</option>
          <option value="lhcp">Left-hand circular</option>
          <option value="linear">Linear</option>
        </SelectField>
        <TextField
          label="Data rate"
          unit="kbit/s"
          inputMode="decimal"
          error={errors?.rateKbps?.message}
          {...register(`${name}.rateKbps`, number)}
        />
        <TextField
          label="Needed Eb/N0"
          unit="dB"
          inputMode="decimal"
          error={errors?.requiredEbN0Db?.message}
          {...register(`${name}.requiredEbN0Db`, number)}
        />
        {name === 'downlink' ? (
          <TextField
            label="EIRP"
            unit="dBW"
            inputMode="decimal"
            error={formState.errors.downlink?.eirpDbw?.message}
            {...register('downlink.eirpDbw', number)}
          />
        ) : (
          <TextField
            label="G/T"
            unit="dB/K"
            inputMode="decimal"
            error={formState.errors.uplink?.gOverTDbK?.message}
            {...register('uplink.gOverTDbK', number)}
          />
        )}
      </div>
    </fieldset>
  );
}
