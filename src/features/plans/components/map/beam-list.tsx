import { MissionMark } from '../../../../components/mission-mark.tsx';
import { EmptyState } from '../../../../components/states.tsx';
import { Cell, Head, RowHead, Table } from '../../../../components/table.tsx';
import { counted, decimals } from '../../../../lib/format-number.ts';
import { clockMinutes, clockSeconds } from '../../../../lib/format-time.ts';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import { usePlanView } from '../../hooks/plan-view.ts';
import type { SkyInstant } from '../../hooks/use-sky-instant.ts';
import { lookOfPass } from '../../model/reasons.ts';

/** The numbers of the map: beams at the instant, and who is above the horizon without one, and why. */
export function BeamList({ sky }: { sky: SkyInstant }) {
  const { instantMs, selectContact } = usePlanView();
  const { missions, labelOf } = usePlanDesk();
  return (
    <div
      className="h-full overflow-y-auto bg-surface px-4.5 py-3"
      tabIndex={0}
      role="group"
      aria-label="Beams"
    >
      <h2 className="text-section font-semibold">Beams at {clockSeconds(instantMs)}</h2>
      <p className="mb-2 text-ink-muted">
        {sky.receiveBeams} receive, {sky.transmitBeams} transmit
      </p>
      {sky.beams.length === 0 ? (
        <EmptyState icon="outside" title="No beam is up at this instant" />
      ) : (
        <Table caption="Beams at the instant" bare>
          <thead>
            <tr>
              <Head>Satellite, channel</Head>
              <Head num unit="km">
                Range
              </Head>
              <Head num unit="dB">
                Loss
              </Head>
              <Head num unit="deg">
                Elev.
              </Head>
            </tr>
          </thead>
          <tbody>
            {sky.beams.map(({ contact, look, lossDb }) => (
              <tr key={contact.id}>
                <RowHead>
                  <button
                    type="button"
                    className="flex items-start gap-2 rounded-mark text-left hover:underline"
                    onClick={() => selectContact(contact.id)}
                  >
                    <MissionMark series={missions.series(contact.missionId)} className="mt-1" />
                    <span>
                      {contact.satelliteName}
                      <span className="figures block text-caption font-normal text-ink-muted">
                        {labelOf(contact.receive.channelId)}
                        {contact.transmit && ` and ${labelOf(contact.transmit.channelId)}`}, to{' '}
                        {clockMinutes(Date.parse(contact.receive.toUtc))}
                      </span>
                    </span>
                  </button>
                </RowHead>
                <Cell num>{Math.round(look.rangeKm)}</Cell>
                <Cell num>{decimals(lossDb, 1)}</Cell>
                <Cell num>{decimals(look.elevationDeg, 1)}</Cell>
              </tr>
            ))}
          </tbody>
        </Table>
      )}
      <IdleList sky={sky} />
    </div>
  );
}

function IdleList({ sky }: { sky: SkyInstant }) {
  const { missions, openPasses, plan } = usePlanDesk();
  const { instantMs, selectPass } = usePlanView();
  if (sky.idle.length === 0) return null;
  const whyOf = (passId: string): string => {
    const open = openPasses?.find((pass) => pass.passId === passId);
    if (open) return lookOfPass(open).word.toLowerCase();
    const contact = plan.contacts.find((one) => 'passId' in one && one.passId === passId);
    if (!contact) return '–';
    const [from, to] = [Date.parse(contact.receive.fromUtc), Date.parse(contact.receive.toUtc)];
    return instantMs >= to
      ? `contact ended ${clockMinutes(to)}`
      : `contact from ${clockMinutes(from)}`;
  };
  return (
    <section aria-label="Above the horizon, no contact now" className="mt-5">
      <h3 className="font-semibold">
        Above the horizon, no contact now{' '}
        <span className="font-normal text-ink-muted">{counted(sky.idle.length, 'satellite')}</span>
      </h3>
      <ul>
        {sky.idle.map(({ pass }) => (
          <li key={pass.id} className="flex items-center gap-2 border-b border-line-soft py-1.5">
            <MissionMark series={missions.series(pass.missionId)} size={8} />
            <button
              type="button"
              className="rounded-mark hover:underline"
              onClick={() => selectPass(pass.id)}
            >
              {pass.satelliteName}
            </button>
            <span className="ml-auto text-ink-muted">{whyOf(pass.id)}</span>
          </li>
        ))}
      </ul>
    </section>
  );
}
