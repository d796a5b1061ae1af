import { useQuery } from '@tanstack/react-query';
import { useState, type SyntheticEvent } from 'react';
import { PatchChannel, type Channel } from '../../../../shared/schemas/channel.ts';
import type { Station } from '../../../../shared/schemas/station.ts';
import { useAnnounce } from '../../../components/announcer.tsx';
import { Button } from '../../../components/button.tsx';
import { Chip } from '../../../components/chip.tsx';
import { Dialog } from '../../../components/dialog.tsx';
import { CheckField, TextField } from '../../../components/field.tsx';
import { Panel } from '../../../components/panel.tsx';
import { QueryView } from '../../../components/query-view.tsx';
import { EmptyState, ErrorNote } from '../../../components/states.tsx';
import { Cell, Head, RowHead, Table } from '../../../components/table.tsx';
import { useMay } from '../../../hooks/use-session.ts';
import { asNumber } from '../../../lib/form-errors.ts';
import { stationQueries, usePatchChannel } from '../../../queries/station-queries.ts';

const POLARISATION: Record<Channel['polarisation'], string> = {
  rhcp: 'right-hand circular',
  lhcp: 'left-hand circular',
  linear: 'linear',
  both: 'either circular',
};

export function ChannelPanel({ station }: { station: Station }) {
  const { may } = useMay();
  const channels = useQuery(stationQueries.channels(station.id));
  const [open, setOpen] = useState<Channel | null>(null);
  const mayEdit = may('edit.channels');
  return (
    <Panel title="Beam channels" flush>
      <QueryView
        query={channels}
        what="The channels"
        isEmpty={(list) => list.length === 0}
        empty={<EmptyState title="No channel yet" />}
      >
        {(list) => (
          <Table caption="Beam channels">
            <thead>
              <tr>
                <Head>Channel</Head>
                <Head>Direction</Head>
                <Head>Polarisation</Head>
                <Head num unit="kHz">
                  Bandwidth
                </Head>
                <Head num unit="s">
                  Set-up
                </Head>
                <Head num unit="s">
                  Tear-down
                </Head>
                <Head>Service</Head>
                {mayEdit && (
                  <Head>
                    <span className="sr-only">Change</span>
                  </Head>
                )}
              </tr>
            </thead>
            <tbody>
              {list.map((channel) => (
                <tr key={channel.id} className="hover:bg-raised">
                  <RowHead>{channel.label}</RowHead>
                  <Cell>{channel.direction}</Cell>
                  <Cell>{POLARISATION[channel.polarisation]}</Cell>
                  <Cell num>{channel.bandwidthKhz}</Cell>
                  <Cell num>{channel.setUpSeconds}</Cell>
                  <Cell num>{channel.tearDownSeconds}</Cell>
                  <Cell>
                    {channel.inService ? (
                      'in service'
                    ) : (
                      <Chip tone="neutral" icon="struck">
                        Out of service
                      </Chip>
                    )}
                  </Cell>
                  {mayEdit && (
                    <Cell className="text-right">
                      <Button size="small" variant="quiet" onClick={() => setOpen(channel)}>
                        Change <span className="sr-only">{channel.label}</span>
                      </Button>
                    </Cell>
                  )}
                </tr>
              ))}
            </tbody>
          </Table>
        )}
      </QueryView>
      {open && <ChannelDialog channel={open} onClose={() => setOpen(null)} />}
    </Panel>
  );
}

const FIELDS = [
  ['label', 'Label', ''],
  ['bandwidthKhz', 'Bandwidth', 'kHz'],
  ['setUpSeconds', 'Set-up', 's'],
  ['tearDownSeconds', 'Tear-down', 's'],
] as const;
type FieldName = (typeof FIELDS)[number][0];

function ChannelDialog({ channel, onClose }: { channel: Channel; onClose: () => void }) {
  const patch = usePatchChannel();
  const announce = useAnnounce();
  const [values, setValues] = useState<Record<FieldName, string>>({
    label: channel.label,
    bandwidthKhz: String(channel.bandwidthKhz),
    setUpSeconds: String(channel.setUpSeconds),
    tearDownSeconds: String(channel.tearDownSeconds),
  });
  const [inService, setInService] = useState(channel.inService);
  const [errors, setErrors] = useState<Record<string, string>>({});
  const submit = (event: SyntheticEvent): void => {
    event.preventDefault();
    const checked = PatchChannel.safeParse({
      label: values.label,
      bandwidthKhz: asNumber(values.bandwidthKhz),
      setUpSeconds: asNumber(values.setUpSeconds),
      tearDownSeconds: asNumber(values.tearDownSeconds),
      inService,
    });
    if (!checked.success) {
      setErrors(
        Object.fromEntries(checked.error.issues.map((one) => [String(one.path[0]), one.message])),
      );
      return;
    }
    patch.mutate(
      { channel, body: checked.data },
      {
        onSuccess: ({ label }) => {
          announce(`Channel ${label} is saved.`);
          onClose();
        },
      },
    );
  };
  return (
    <Dialog
      open
      onClose={onClose}
      title={`Change channel ${channel.label}`}
      description="Plans that break by it are marked; nothing on them is edited."
    >
      <form noValidate className="flex flex-col gap-3.5" onSubmit={submit}>
        <div className="grid grid-cols-2 gap-3">
          {FIELDS.map(([name, label, unit]) => (
            <TextField
              key={name}
              label={label}
              unit={unit}
              value={values[name]}
              onChange={(event) =>
                setValues((before) => ({ ...before, [name]: event.target.value }))
              }
              error={errors[name]}
            />
          ))}
        </div>
        <CheckField
          label="In service"
          checked={inService}
          onChange={(event) => setInService(event.target.checked)}
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
