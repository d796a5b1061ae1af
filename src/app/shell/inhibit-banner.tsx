import { Icon } from '../../components/icon.tsx';
import { useStation } from '../../hooks/use-station.ts';
import { dateClock } from '../../lib/format-time.ts';

/** Stands on every page while people are at the array. */
export function InhibitBanner() {
  const inhibit = useStation().station?.transmitInhibit;
  if (!inhibit) return null;
  return (
    <div
      role="alert"
      className="flex items-center gap-2.5 border-b border-danger-mark bg-danger-soft px-5 py-2 text-body text-danger-text"
    >
      <Icon name="closure" />
      <p>
        <strong className="font-semibold">Transmit inhibit, people at the array.</strong> Since{' '}
        {dateClock(Date.parse(inhibit.sinceUtc))} UTC by {inhibit.by}: {inhibit.reason}
      </p>
    </div>
  );
}
