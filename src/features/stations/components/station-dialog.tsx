import { useState, type SyntheticEvent } from 'react';
import { PatchStation, type Station } from '../../../../shared/schemas/station.ts';
import { useAnnounce } from '../../../components/announcer.tsx';
import { Button } from '../../../components/button.tsx';
import { Dialog } from '../../../components/dialog.tsx';
import { TextAreaField, TextField } from '../../../components/field.tsx';
import { ErrorNote } from '../../../components/states.tsx';
import { asNumber } from '../../../lib/form-errors.ts';
import { usePatchStation } from '../../../queries/station-queries.ts';
import { maskText, readMask } from '../mask-text.ts';

const FIELDS = [
  ['name', 'Name', ''],
  ['timeZone', 'Time zone', ''],
  ['latitudeDeg', 'Latitude', 'deg'],
  ['longitudeDeg', 'Longitude', 'deg'],
  ['heightM', 'Height', 'm'],
  ['ut1MinusUtcSeconds', 'UT1 − UTC', 's'],
  ['receiveElevationFloorDeg', 'Receive floor', 'deg'],
  ['transmitElevationFloorDeg', 'Transmit floor', 'deg'],
  ['guardTimeSeconds', 'Guard time', 's'],
  ['freezeTimeSeconds', 'Freeze time', 's'],
  ['signOffCutOffMinutes', 'Sign-off cut-off', 'min'],
] as const;
type FieldName = (typeof FIELDS)[number][0];
const TEXTS = new Set<FieldName>(['name', 'timeZone']);

interface Props {
  station: Station;
  onClose: () => void;
}

export function StationDialog({ station, onClose }: Props) {
  const patch = usePatchStation();
  const announce = useAnnounce();
  const [values, setValues] = useState<Record<FieldName, string>>(
    () =>
      Object.fromEntries(FIELDS.map(([name]) => [name, String(station[name])])) as Record<
        FieldName,
        string
      >,
  );
  const [mask, setMask] = useState(maskText(station.horizonMask));
  const [errors, setErrors] = useState<Record<string, string>>({});

  const submit = (event: SyntheticEvent): void => {
    event.preventDefault();
    const horizonMask = readMask(mask);
    const checked = PatchStation.safeParse({
      ...Object.fromEntries(
        FIELDS.map(([name]) => [name, TEXTS.has(name) ? values[name] : asNumber(values[name])]),
      ),
      horizonMask: typeof horizonMask === 'string' ? [] : horizonMask,
    });
    const found = checked.success
      ? {}
      : Object.fromEntries(checked.error.issues.map((one) => [String(one.path[0]), one.message]));
    if (typeof horizonMask === 'string') found.horizonMask = horizonMask;
    setErrors(found);
    if (!checked.success || Object.keys(found).length > 0) return;
    patch.mutate(
      { station, body: checked.data },
      {
        onSuccess: () => {
          announce(
            'The station is saved. Its passes are predicted again if its place or mask changed.',
          );
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
      title={`Change ${station.name}`}
      description="Another place or mask predicts all passes again; plans that break are marked."
    >
      <form noValidate className="flex flex-col gap-3.5" onSubmit={submit}>
        <div className="grid grid-cols-2 gap-3 md:grid-cols-4">
          {FIELDS.map(([name, label, unit]) => (
            <TextField
              key={name}
              label={label}
              unit={unit}
              inputMode={TEXTS.has(name) ? 'text' : 'decimal'}
              value={values[name]}
              onChange={(event) =>
                setValues((before) => ({ ...before, [name]: event.target.value }))
              }
              error={errors[name]}
            />
          ))}
        </div>
        <TextAreaField
          label="Horizon mask"
          unit="azimuth and elevation in deg, one pair a line"
          rows={6}
          className="font-mono"
          hint="Paste a table of pairs; azimuths grow"
          value={mask}
          onChange={(event) => setMask(event.target.value)}
          error={errors.horizonMask}
        />
        <ErrorNote error={patch.error} />
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>Keep as it is</Button>
          <Button type="submit" variant="primary" busy={patch.isPending}>
            Save the changes
          </Button>
        </div>
      </form>
    </Dialog>
  );
}
