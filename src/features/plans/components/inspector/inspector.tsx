import { isHidden } from '../../../../../shared/schemas/plan.ts';
import { IconButton } from '../../../../components/button.tsx';
import { Facts } from '../../../../components/facts.tsx';
import { clockSeconds } from '../../../../lib/format-time.ts';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import { usePlanView } from '../../hooks/plan-view.ts';
import { ContactInspector } from './contact-inspector.tsx';
import { DaySummary } from './day-summary.tsx';
import { OpenPassInspector } from './open-pass-inspector.tsx';

/** The right column: what is selected, else the day in numbers. */
export function Inspector() {
  const { contacts, openPasses, labelOf } = usePlanDesk();
  const { contactId, passId, selectContact } = usePlanView();
  const contact = contactId === null ? undefined : contacts.get(contactId);
  const pass = passId === null ? undefined : openPasses?.find((one) => one.passId === passId);
  if (contact && isHidden(contact))
    return (
      <section aria-labelledby="inspected" className="h-full bg-surface px-4.5 py-3">
        <div className="flex items-center">
          <h2 id="inspected" className="text-section font-semibold">
            A contact of another mission
          </h2>
          <IconButton
            icon="close"
            label="Close"
            className="-mr-2 ml-auto"
            onClick={() => selectContact(null)}
          />
        </div>
        <p className="mb-2 text-ink-muted">
          Channels and times are shown to everybody, nothing more.
        </p>
        <Facts
          rows={[
            [
              'Receive',
              `${labelOf(contact.receive.channelId)}, ${clockSeconds(Date.parse(contact.receive.fromUtc))}–${clockSeconds(Date.parse(contact.receive.toUtc))}`,
            ],
            ['Uplink', contact.transmit ? labelOf(contact.transmit.channelId) : 'none'],
          ]}
        />
      </section>
    );
  if (contact) return <ContactInspector key={contact.id} contact={contact} />;
  if (pass) return <OpenPassInspector key={pass.passId} pass={pass} />;
  return <DaySummary />;
}
