import { useState, type SyntheticEvent } from 'react';
import type { Mission } from '../../../../shared/schemas/mission.ts';
import { CreateRequest } from '../../../../shared/schemas/requirement.ts';
import type { Satellite } from '../../../../shared/schemas/satellite.ts';
import { useAnnounce } from '../../../components/announcer.tsx';
import { Button } from '../../../components/button.tsx';
import { Dialog } from '../../../components/dialog.tsx';
import { SelectField, TextAreaField, TextField } from '../../../components/field.tsx';
import { ErrorNote } from '../../../components/states.tsx';
import { asNumber } from '../../../lib/form-errors.ts';
import { useCreateRequest } from '../../../queries/mission-queries.ts';

interface Props {
  mission: Mission;
  satellites: readonly Satellite[];
  onClose: () => void;
}

/** A field for an instant holds UTC, as everything on screen does. */
const toUtc = (text: string): string => (text ? `${text}:00.000Z` : '');

export function RequestDialog({ mission, satellites, onClose }: Props) {
  const create = useCreateRequest();
  const announce = useAnnounce();
  const [values, setValues] = useState({
    satelliteId: satellites[0]?.id ?? '',
    kind: 'minutes',
    minutes: '10',
    uplink: 'none',
    from: '',
    to: '',
    priority: String(mission.priority),
    reason: '',
  });
  const [errors, setErrors] = useState<Record<string, string>>({});
  const field = (name: keyof typeof values) => ({
    value: values[name],
    onChange: (event: { target: { value: string } }) =>
      setValues((before) => ({ ...before, [name]: event.target.value })),
  });
  const submit = (event: SyntheticEvent): void => {
    event.preventDefault();
    const checked = CreateRequest.safeParse({
      missionId: mission.id,
      satelliteId: values.satelliteId,
      kind: values.kind,
      passId: null,
      minutes: values.kind === 'minutes' ? asNumber(values.minutes) : null,
      uplink: values.uplink,
      fromUtc: toUtc(values.from),
      toUtc: toUtc(values.to),
      priority: Number(values.priority),
      reason: values.reason,
    });
    if (!checked.success) {
      const found = checked.error.issues.map((one) => [String(one.path[0]), one.message]);
      setErrors(Object.fromEntries(found) as Record<string, string>);
      return;
    }
    setErrors({});
    create.mutate(checked.data, {
      onSuccess: () => {
        announce('The request is filed.');
        onClose();
      },
    });
  };
  return (
    <Dialog open onClose={onClose} title={`A request of ${mission.name}`}>
      <form noValidate className="flex flex-col gap-3.5" onSubmit={submit}>
        <div className="grid grid-cols-2 gap-3">
          <SelectField label="Satellite" error={errors.satelliteId} {...field('satelliteId')}>
            {satellites.map(({ id, name }) => (
              <option key={id} value={id}>
                {name}
              </option>
            ))}
          </SelectField>
          <SelectField label="What" {...field('kind')}>
            <option value="minutes">minutes of contact</option>
            <option value="none">no contact</option>
          </SelectField>
          {values.kind === 'minutes' && (
            <>
              <TextField
                label="Minutes"
                inputMode="decimal"
                error={errors.minutes}
                {...field('minutes')}
              />
              <SelectField label="Uplink" {...field('uplink')}>
                <option value="none">none</option>
                <option value="wanted">wanted</option>
                <option value="required">required</option>
              </SelectField>
            </>
          )}
          <TextField
            label="From"
            unit="UTC"
            type="datetime-local"
            error={errors.fromUtc && 'Say from when'}
            {...field('from')}
          />
          <TextField
            label="To"
            unit="UTC"
            type="datetime-local"
            error={errors.toUtc && 'Say until when'}
            {...field('to')}
          />
          <SelectField label="Priority" hint="1 is the highest" {...field('priority')}>
            {[1, 2, 3, 4, 5].map((value) => (
              <option key={value} value={value}>
                {value}
              </option>
            ))}
          </SelectField>
        </div>
        <TextAreaField label="Reason" error={errors.reason} {...field('reason')} />
        <ErrorNote error={create.error} />
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>Keep as it is</Button>
          <Button type="submit" variant="primary" busy={create.isPending}>
            File the request
          </Button>
        </div>
      </form>
    </Dialog>
  );
}
