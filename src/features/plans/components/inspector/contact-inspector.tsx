import type { Contact } from '../../../../../shared/schemas/plan.ts';
import { Chip } from '../../../../components/chip.tsx';
import { IconButton } from '../../../../components/button.tsx';
import { MissionMark } from '../../../../components/mission-mark.tsx';
import { PassCharts } from '../../../../components/pass-charts.tsx';
import { frequency, signed } from '../../../../lib/format-number.ts';
import { minutesSeconds } from '../../../../lib/format-time.ts';
import { polarisationWord } from '../../../../lib/polarisation.ts';
import { seriesColor } from '../../../../lib/series.ts';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import { usePlanView } from '../../hooks/plan-view.ts';
import { useNeighbours } from '../../hooks/use-neighbours.ts';
import { legInterval } from '../../model/plan-legs.ts';
import { ContactActions } from './contact-actions.tsx';
import { ContactHistory } from './contact-history.tsx';
import { INSPECTOR_CHART_WIDTH } from './inspector-width.ts';
import { IsolationChart, NeighbourTable } from './neighbours.tsx';
import { PassInstants } from './pass-instants.tsx';

/** Everything about one contact; its actions stay in reach at the foot. */
export function ContactInspector({ contact }: { contact: Contact }) {
  const { missions, station, plan, passes } = usePlanDesk();
  const { selectContact, instantMs, view } = usePlanView();
  const neighbours = useNeighbours(contact);
  const series = missions.series(contact.missionId);
  const color = series === null ? 'var(--ink-muted)' : seriesColor(series);
  const pass = passes.get(contact.passId);
  const used = legInterval(contact.receive);
  const [fromMs, toMs, tcaMs] = pass
    ? [Date.parse(pass.aosUtc), Date.parse(pass.losUtc), Date.parse(pass.tcaUtc)]
    : [used.fromMs, used.toMs, (used.fromMs + used.toMs) / 2];
  return (
    <section aria-labelledby="inspected" className="flex h-full min-h-0 flex-col bg-surface">
      <div
        className="min-h-0 flex-1 overflow-y-auto px-4.5 py-3"
        tabIndex={0}
        role="group"
        aria-labelledby="inspected"
      >
        <div className="flex items-center gap-2">
          <MissionMark series={series} size={12} />
          <h2 id="inspected" className="text-section font-semibold">
            {contact.satelliteName}
          </h2>
          <ContactChips contact={contact} />
          <IconButton
            icon="close"
            label="Close the contact"
            className="-mr-2 ml-auto"
            onClick={() => selectContact(null)}
          />
        </div>
        <ContactLine contact={contact} />
        <div className="mt-2.5">
          <PassInstants
            passId={contact.passId}
            fromMs={fromMs}
            toMs={toMs}
            tcaMs={tcaMs}
            missionId={contact.missionId}
            used={used}
            usedWord="Contact"
          />
        </div>
        <ContactNumbers contact={contact} />
        <PassCharts
          passId={contact.passId}
          fromMs={fromMs}
          toMs={toMs}
          tcaMs={tcaMs}
          faceId={contact.faceId}
          color={color}
          within={[used]}
          elevationFloorDeg={station.receiveElevationFloorDeg}
          limitDb={plan.limitOfDayDb}
          instantMs={view === 'sky' || view === 'map' ? instantMs : null}
          width={INSPECTOR_CHART_WIDTH}
        />
        {neighbours.length > 0 && (
          <>
            <IsolationChart neighbours={neighbours} fromMs={fromMs} toMs={toMs} used={used} />
            <NeighbourTable neighbours={neighbours} />
          </>
        )}
        <ContactWarnings contact={contact} />
        <ContactHistory contactId={contact.id} />
      </div>
      <ContactActions contact={contact} />
    </section>
  );
}

function ContactChips({ contact }: { contact: Contact }) {
  return (
    <>
      {contact.locked && (
        <Chip tone="neutral" icon="lock">
          Locked
        </Chip>
      )}
      {contact.driftSeconds !== null && (
        <Chip tone="warn" icon="drifted">
          Drifted {signed(contact.driftSeconds, 1)} s
        </Chip>
      )}
      {contact.emergency && (
        <Chip tone="danger" icon="needsAttention">
          Emergency
        </Chip>
      )}
    </>
  );
}

function ContactLine({ contact }: { contact: Contact }) {
  const { labelOf, satellites, faces } = usePlanDesk();
  const satellite = satellites.get(contact.satelliteId);
  const face = faces.find(({ id }) => id === contact.faceId);
  return (
    <p className="mt-0.5 text-ink-muted">
      On {labelOf(contact.receive.channelId)}
      {contact.transmit && ` and ${labelOf(contact.transmit.channelId)}`}, {face?.label}
      {satellite &&
        `, ${polarisationWord(satellite.downlink.polarisation)}, ${frequency(satellite.downlink.frequencyMhz)} MHz`}
      {contact.transmit ? '' : ', receive only'}
      {contact.note && <span className="mt-0.5 block italic">{contact.note}</span>}
    </p>
  );
}

function ContactNumbers({ contact }: { contact: Contact }) {
  const { passes, satellites } = usePlanDesk();
  const used = legInterval(contact.receive);
  const uplink = contact.transmit && legInterval(contact.transmit);
  const window = passes
    .get(contact.passId)
    ?.windows.find(({ faceId, direction }) => faceId === contact.faceId && direction === 'receive');
  const rate = satellites.get(contact.satelliteId)?.downlink.rateKbps;
  const seconds = (used.toMs - used.fromMs) / 1000;
  const numbers: [string, string, string][] = [
    ...(window
      ? [
          ['Usable', minutesSeconds(Date.parse(window.toUtc) - Date.parse(window.fromUtc)), ''] as [
            string,
            string,
            string,
          ],
        ]
      : []),
    ['Contact', minutesSeconds(used.toMs - used.fromMs), ''],
    ...(uplink
      ? [['Uplink', minutesSeconds(uplink.toMs - uplink.fromMs), ''] as [string, string, string]]
      : []),
    ...(rate
      ? [
          ['Volume', String(Math.round((rate * seconds) / 1000)), ' Mbit'] as [
            string,
            string,
            string,
          ],
        ]
      : []),
  ];
  return (
    <p className="figures my-3 flex justify-between rounded-control bg-raised px-3 py-1.5 text-caption text-ink-muted">
      {numbers.map(([word, value, unit]) => (
        <span key={word} className="flex flex-col">
          {word}
          <span>
            <strong className="text-table font-semibold text-ink">{value}</strong>
            {unit}
          </span>
        </span>
      ))}
    </p>
  );
}

function ContactWarnings({ contact }: { contact: Contact }) {
  const { plan } = usePlanDesk();
  const own = plan.warnings.filter(({ contactIds }) => contactIds.includes(contact.id));
  if (own.length === 0) return null;
  return (
    <section aria-label="Warnings" className="mt-3 border-t border-line-soft pt-2">
      <h3 className="font-semibold">Warnings</h3>
      <ul>
        {own.map((warning, index) => (
          <li key={index} className="mt-1 text-warn-text">
            {warning.message}
          </li>
        ))}
      </ul>
    </section>
  );
}
