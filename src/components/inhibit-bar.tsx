import { useState } from 'react';
import type { Station } from '../../shared/schemas/station.ts';
import { useAnnounce } from './announcer.tsx';
import { Button } from './button.tsx';
import { Icon } from './icon.tsx';
import { ReasonDialog } from './reason-dialog.tsx';
import { ErrorNote } from './states.tsx';
import { useMay } from '../hooks/use-session.ts';
import { dateClock } from '../lib/format-time.ts';
import { useEndInhibit, useSetInhibit } from '../queries/station-queries.ts';

/** Transmit inhibit, people at the array: one button, in force at once everywhere, ended by name. */
export function InhibitBar({ station }: { station: Station }) {
  const { may } = useMay();
  const set = useSetInhibit();
  const end = useEndInhibit();
  const announce = useAnnounce();
  const [asking, setAsking] = useState(false);
  const mayAct = may('inhibit.transmit');
  const inhibit = station.transmitInhibit;
  if (inhibit)
    return (
      <div
        role="alert"
        className="flex flex-wrap items-center gap-3 rounded-panel border border-danger-mark bg-danger-soft px-4 py-3 text-danger-text"
      >
        <Icon name="needsAttention" size={20} />
        <div className="min-w-0">
          <p className="text-section font-semibold">Transmit inhibit, people at the array</p>
          <p className="text-table">
            {inhibit.reason}. Since {dateClock(Date.parse(inhibit.sinceUtc))} UTC by {inhibit.by}.
          </p>
        </div>
        {mayAct && (
          <Button
            className="ml-auto"
            busy={end.isPending}
            onClick={() =>
              end.mutate(station.id, {
                onSuccess: () => announce('The transmit inhibit is ended.'),
              })
            }
          >
            Nobody is at the array: end the inhibit
          </Button>
        )}
        <ErrorNote error={end.error} />
      </div>
    );
  if (!mayAct) return null;
  return (
    <div className="flex flex-wrap items-center gap-3 rounded-panel border border-line bg-surface px-4 py-2.5">
      <p className="text-table text-ink-muted">
        The inhibit stops planned transmission at once on plan, shift page and exports. It replaces
        no interlock and no lock-out at the array.
      </p>
      <Button
        variant="danger"
        icon="needsAttention"
        className="ml-auto"
        onClick={() => setAsking(true)}
      >
        Transmit inhibit, people at the array
      </Button>
      <ReasonDialog
        open={asking}
        onClose={() => setAsking(false)}
        title="Stop all transmission of this station now?"
        description="In force at once and until somebody ends it by name. Downlinks go on."
        label="Who is at the array, and why"
        action="Inhibit transmission"
        busy={set.isPending}
        error={set.error}
        onSubmit={(reason) =>
          set.mutate(
            { stationId: station.id, reason },
            {
              onSuccess: () => {
                announce('Transmission is inhibited.');
                setAsking(false);
              },
            },
          )
        }
      />
    </div>
  );
}
