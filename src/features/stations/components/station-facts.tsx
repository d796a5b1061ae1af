import type { Station } from '../../../../shared/schemas/station.ts';
import { Panel } from '../../../components/panel.tsx';
import { decimals } from '../../../lib/format-number.ts';

/** What the station allows and how its days run. */
export function StationFacts({ station }: { station: Station }) {
  const facts: [string, string][] = [
    ['Receive elevation floor', `${decimals(station.receiveElevationFloorDeg, 1)}°`],
    ['Transmit elevation floor', `${decimals(station.transmitElevationFloorDeg, 1)}°`],
    ['Guard time', `${station.guardTimeSeconds} s`],
    ['Freeze time', `${Math.round(station.freezeTimeSeconds / 60)} min before a contact`],
    ['Sign-off cut-off', `${Math.round(station.signOffCutOffMinutes / 60)} h before the day`],
    ['UT1 − UTC', `${decimals(station.ut1MinusUtcSeconds, 3)} s`],
    ['Horizon mask', `${station.horizonMask.length} knots`],
    [
      'Keep-out sectors, transmit',
      station.keepOutSectors
        .map(
          (one) =>
            `${one.label}: azimuth ${one.azimuthFromDeg}° to ${one.azimuthToDeg}°, up to ${one.elevationToDeg}°`,
        )
        .join('; ') || 'none',
    ],
  ];
  return (
    <Panel title="Limits and times">
      <dl className="grid gap-x-6 gap-y-2 sm:grid-cols-2">
        {facts.map(([name, value]) => (
          <div
            key={name}
            className="flex items-baseline justify-between gap-4 border-b border-line-soft pb-1.5 text-table"
          >
            <dt className="text-ink-muted">{name}</dt>
            <dd className="figures text-right">{value}</dd>
          </div>
        ))}
      </dl>
      <p className="mt-3 text-caption text-ink-muted">
        Floors, sectors and powers here are planning values. Your licence, local rules and a survey
        by a qualified person come first.
      </p>
    </Panel>
  );
}
