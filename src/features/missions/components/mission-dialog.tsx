import { zodResolver } from '@hookform/resolvers/zod';
import { useQuery } from '@tanstack/react-query';
import { useForm, useWatch } from 'react-hook-form';
import { CreateMission, type Mission } from '../../../../shared/schemas/mission.ts';
import { useAnnounce } from '../../../components/announcer.tsx';
import { Button } from '../../../components/button.tsx';
import { Dialog } from '../../../components/dialog.tsx';
import { CheckField, SelectField, TextField } from '../../../components/field.tsx';
import { ErrorNote } from '../../../components/states.tsx';
import { useMay } from '../../../hooks/use-session.ts';
import { asNumber } from '../../../lib/form-errors.ts';
import { useCreateMission, usePatchMission } from '../../../queries/mission-queries.ts';
import { peopleQueries } from '../../../queries/people-queries.ts';

interface Props {
  mission: Mission | null;
  onClose: () => void;
}

const SERIES = ['Moss', 'Plum', 'Teal', 'Ochre', 'Violet', 'Rose'];
const seriesWord = (series: number): string =>
  `${SERIES[(series - 1) % SERIES.length] ?? ''}${series > SERIES.length ? ', dashed' : ''}`;

/** Name, code and colour; leads and priority for the administrator. */
export function MissionDialog({ mission, onClose }: Props) {
  return (
    <Dialog open onClose={onClose} title={mission ? `Change ${mission.name}` : 'Add a mission'}>
      <MissionForm mission={mission} onClose={onClose} />
    </Dialog>
  );
}

function MissionForm({ mission, onClose }: Props) {
  const { may } = useMay();
  const isKeeper = may('create.missions');
  const create = useCreateMission();
  const patch = usePatchMission();
  const announce = useAnnounce();
  const form = useForm<CreateMission>({
    resolver: zodResolver(CreateMission),
    defaultValues: {
      name: mission?.name ?? '',
      code: mission?.code ?? '',
      series: mission?.series ?? 1,
      priority: mission?.priority ?? 3,
      leadIds: mission?.leadIds ?? [],
    },
  });
  const { register, handleSubmit, formState } = form;
  const done = (saved: Mission): void => {
    announce(`${saved.name} is saved.`);
    onClose();
  };
  const save = (body: CreateMission): void => {
    if (!mission) return create.mutate(body, { onSuccess: done });
    const { leadIds, priority, ...own } = body;
    patch.mutate(
      { mission, body: isKeeper ? { ...own, leadIds, priority } : own },
      { onSuccess: done },
    );
  };
  return (
    <form
      noValidate
      className="flex flex-col gap-3.5"
      onSubmit={(event) => void handleSubmit(save)(event)}
    >
      <div className="grid grid-cols-2 gap-3">
        <TextField label="Name" error={formState.errors.name?.message} {...register('name')} />
        <TextField
          label="Code"
          hint="Two to six capital letters or digits"
          error={formState.errors.code?.message}
          {...register('code')}
        />
        <SelectField label="Colour" {...register('series', { setValueAs: asNumber })}>
          {Array.from({ length: 12 }, (_, index) => (
            <option key={index} value={index + 1}>
              {seriesWord(index + 1)}
            </option>
          ))}
        </SelectField>
        {isKeeper && (
          <SelectField
            label="Priority"
            hint="1 is the highest"
            {...register('priority', { setValueAs: asNumber })}
          >
            {[1, 2, 3, 4, 5].map((value) => (
              <option key={value} value={value}>
                {value}
              </option>
            ))}
          </SelectField>
        )}
      </div>
      {isKeeper && <Leads form={form} />}
      <ErrorNote error={create.error ?? patch.error} />
      <div className="flex justify-end gap-2">
        <Button onClick={onClose}>Keep as it is</Button>
        <Button type="submit" variant="primary" busy={create.isPending || patch.isPending}>
          {mission ? 'Save the changes' : 'Add the mission'}
        </Button>
      </div>
    </form>
  );
}

function Leads({ form }: { form: ReturnType<typeof useForm<CreateMission>> }) {
  const people = useQuery(peopleQueries.list());
  const chosen = useWatch({ control: form.control, name: 'leadIds' });
  const leads = (people.data ?? []).filter((one) => one.roles.includes('lead') && !one.disabled);
  const toggle = (id: string, on: boolean): void =>
    form.setValue('leadIds', on ? [...chosen, id] : chosen.filter((one) => one !== id), {
      shouldDirty: true,
    });
  return (
    <fieldset className="flex flex-col gap-2">
      <legend className="mb-1.5 text-table font-semibold">Leads</legend>
      {leads.length === 0 && (
        <p className="text-table text-ink-muted">Nobody has the role of a mission lead yet.</p>
      )}
      {leads.map(({ id, name, email }) => (
        <CheckField
          key={id}
          label={name}
          hint={email}
          checked={chosen.includes(id)}
          onChange={(event) => toggle(id, event.target.checked)}
        />
      ))}
    </fieldset>
  );
}
