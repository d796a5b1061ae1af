import { isHidden, type Contact } from '../../../../shared/schemas/plan.ts';
import { Button, buttonLook } from '../../../components/button.tsx';
import { Chip } from '../../../components/chip.tsx';
import { Icon } from '../../../components/icon.tsx';
import { Menu, MenuItem } from '../../../components/menu.tsx';
import { MissionMark } from '../../../components/mission-mark.tsx';
import { EmptyState } from '../../../components/states.tsx';
import { Cell, Head, RowHead, Table } from '../../../components/table.tsx';
import { useSorted } from '../../../hooks/use-sorted.ts';
import { classNames } from '../../../lib/class-names.ts';
import { decimals, directionWords, signed } from '../../../lib/format-number.ts';
import { clockSeconds, minutesSeconds } from '../../../lib/format-time.ts';
import { usePlanDesk } from '../hooks/plan-desk.ts';
import { usePlanEdits } from '../hooks/plan-edits.ts';
import { usePlanView } from '../hooks/plan-view.ts';
import { legInterval } from '../model/plan-legs.ts';

const ORDERS = {
  from: (contact: Contact) => contact.receive.fromUtc,
  satellite: (contact: Contact) => contact.satelliteName,
  elevation: (contact: Contact) => contact.maxElevationDeg,
  loss: (contact: Contact) => contact.maxScanLossDb ?? 0,
};

/** The plan as a table, with the same actions as the calendar. */
export function ContactTable() {
  const { plan, allows } = usePlanDesk();
  const { open } = usePlanEdits();
  const contacts = plan.contacts.filter((one): one is Contact => !isHidden(one));
  const { rows, sortOf } = useSorted(contacts, ORDERS, { by: 'from' });
  const foreign = plan.contacts.length - contacts.length;
  if (contacts.length === 0)
    return (
      <EmptyState
        icon="calendar"
        title="No contact on this plan yet"
        action={
          allows('assign') && (
            <Button variant="primary" onClick={() => open({ kind: 'assignment' })}>
              Assign the open passes
            </Button>
          )
        }
      >
        {foreign > 0
          ? `${foreign} contacts of other missions stand on it; yours has none.`
          : 'Contacts are assigned by the server or by hand from the open passes.'}
      </EmptyState>
    );
  return (
    <Table
      caption="Contacts of the plan"
      className="bg-surface [&_td]:whitespace-nowrap [&_th]:whitespace-nowrap"
    >
      <thead>
        <tr>
          <Head {...sortOf('satellite')}>Satellite</Head>
          <Head {...sortOf('from')}>From UTC</Head>
          <Head>To</Head>
          <Head num unit="min">
            Lasts
          </Head>
          <Head>Receive</Head>
          <Head>Uplink</Head>
          <Head num unit="deg" {...sortOf('elevation')}>
            Highest
          </Head>
          <Head>Pass</Head>
          <Head num unit="dB" {...sortOf('loss')}>
            Worst scan loss
          </Head>
          <Head num unit="dB">
            Least margin
          </Head>
          <Head>State</Head>
          <Head>
            <span className="sr-only">Actions</span>
          </Head>
        </tr>
      </thead>
      <tbody>
        {rows.map((contact) => (
          <ContactRow key={contact.id} contact={contact} />
        ))}
      </tbody>
    </Table>
  );
}

function ContactRow({ contact }: { contact: Contact }) {
  const { missions, labelOf, passes } = usePlanDesk();
  const { contactId, showContact, selectContact } = usePlanView();
  const used = legInterval(contact.receive);
  const pass = passes.get(contact.passId);
  const chosen = contactId === contact.id;
  return (
    <tr className={classNames(chosen ? 'bg-accent-soft' : 'hover:bg-raised')}>
      <RowHead>
        <span className="flex items-center gap-2">
          <MissionMark series={missions.series(contact.missionId)} />
          <button
            type="button"
            className="min-h-6 rounded-mark text-left hover:underline"
            aria-expanded={chosen}
            onClick={() => (chosen ? selectContact(null) : showContact(contact.id, used))}
          >
            {contact.satelliteName}
          </button>
        </span>
      </RowHead>
      <Cell>{clockSeconds(used.fromMs)}</Cell>
      <Cell>{clockSeconds(used.toMs)}</Cell>
      <Cell num>{minutesSeconds(used.toMs - used.fromMs)}</Cell>
      <Cell>{labelOf(contact.receive.channelId)}</Cell>
      <Cell>
        {contact.transmit ? (
          <span className="flex items-center gap-1">
            <Icon name="transmit" size={12} className="text-ink-muted" />
            {labelOf(contact.transmit.channelId)}
          </span>
        ) : (
          '–'
        )}
      </Cell>
      <Cell num>{decimals(contact.maxElevationDeg, 1)}</Cell>
      <Cell muted>{pass ? directionWords(pass) : '–'}</Cell>
      <Cell num>{decimals(contact.maxScanLossDb, 1)}</Cell>
      <Cell num>{decimals(contact.minMarginDb, 1)}</Cell>
      <Cell>
        <RowState contact={contact} />
      </Cell>
      <Cell className="text-right">
        <RowMenu contact={contact} />
      </Cell>
    </tr>
  );
}

function RowState({ contact }: { contact: Contact }) {
  const log = usePlanDesk().logs.get(contact.id);
  return (
    <span className="flex gap-1">
      {contact.locked && (
        <Chip tone="neutral" icon="lock">
          Locked
        </Chip>
      )}
      {contact.driftSeconds !== null && (
        <Chip tone="warn" icon="drifted">
          {signed(contact.driftSeconds, 1)} s
        </Chip>
      )}
      {log?.outcome === 'served' && (
        <Chip tone="ok" icon="approve">
          Served
        </Chip>
      )}
      {log?.outcome === 'partly' && (
        <Chip tone="warn" icon="partly">
          Partly served
        </Chip>
      )}
      {log?.outcome === 'lost' && (
        <Chip tone="danger" icon="struck">
          Lost
        </Chip>
      )}
      {log?.outcome === 'not-attempted' && (
        <Chip tone="neutral" icon="minus">
          Not attempted
        </Chip>
      )}
    </span>
  );
}

function RowMenu({ contact }: { contact: Contact }) {
  const { allows } = usePlanDesk();
  const { open, apply } = usePlanEdits();
  if (!allows('edit') && !allows('operate')) return null;
  const name = contact.satelliteName;
  return (
    <Menu
      buttonClassName={buttonLook('quiet', 'small', 'px-1.5!')}
      buttonProps={{ 'aria-label': `What to do with ${name}` }}
      face={<Icon name="more" />}
    >
      {allows('operate') && (
        <MenuItem icon="move" onSelect={() => open({ kind: 'operate', contactId: contact.id })}>
          Change the running day
        </MenuItem>
      )}
      {allows('edit') && (
        <>
          <MenuItem
            icon="move"
            onSelect={() => open({ kind: 'change', contactId: contact.id, focus: 'channel' })}
          >
            Move
          </MenuItem>
          <MenuItem
            icon="trim"
            onSelect={() => open({ kind: 'change', contactId: contact.id, focus: 'times' })}
          >
            Trim
          </MenuItem>
          <MenuItem
            icon={contact.locked ? 'unlock' : 'lock'}
            onSelect={() =>
              apply(
                [{ op: 'change', contactId: contact.id, locked: !contact.locked }],
                `${name} ${contact.locked ? 'unlocked' : 'locked'}.`,
              )
            }
          >
            {contact.locked ? 'Unlock' : 'Lock'}
          </MenuItem>
          <MenuItem
            icon="close"
            onSelect={() =>
              apply([{ op: 'remove', contactId: contact.id }], `${name} taken off the plan.`)
            }
          >
            Take off
          </MenuItem>
        </>
      )}
    </Menu>
  );
}
