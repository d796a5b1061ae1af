import { useMemo, useState } from 'react';
import { SkySheet } from '../../../../charts/sky-sheet.tsx';
import { ErrorNote } from '../../../../components/states.tsx';
import { useSize } from '../../../../hooks/use-size.ts';
import { counted } from '../../../../lib/format-number.ts';
import { clockSeconds } from '../../../../lib/format-time.ts';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import { usePlanView } from '../../hooks/plan-view.ts';
import { useSkyInstant, type SkyInstant } from '../../hooks/use-sky-instant.ts';
import { closePairs, type BeamPair } from '../../model/close-pairs.ts';
import { Inspector } from '../inspector/inspector.tsx';
import { InstantBar } from './instant-bar.tsx';
import { SheafPanel } from './sheaf-panel.tsx';
import { BeamMark, ClosePair, IdleMarks } from './sky-beams.tsx';
import { SkyLegend } from './sky-legend.tsx';
import { SkyNames } from './sky-names.tsx';

/** The sky at one instant, with the sheaf beside it. */
export function PlanSky() {
  const { satellites } = usePlanDesk();
  const { instantMs, contactId } = usePlanView();
  const sky = useSkyInstant(instantMs);
  const pairs = useMemo(
    () => closePairs(sky.beams, satellites, instantMs),
    [sky.beams, satellites, instantMs],
  );
  return (
    <>
      <div
        className={`grid min-h-0 flex-1 ${contactId ? 'drawer:grid-cols-[minmax(0,1fr)_21.5rem]' : 'drawer:grid-cols-[minmax(0,1.62fr)_minmax(0,1fr)]'}`}
      >
        <SkyPanel sky={sky} pairs={pairs} />
        <div className="flex min-h-0 min-w-0 flex-col border-line drawer:border-l [&>*]:flex-1">
          {contactId ? <Inspector /> : <SheafPanel beams={sky.beams} pairs={pairs} />}
        </div>
      </div>
      <InstantBar />
    </>
  );
}

function SkyPanel({ sky, pairs }: { sky: SkyInstant; pairs: readonly BeamPair[] }) {
  const { ground, station, groups } = usePlanDesk();
  const { instantMs } = usePlanView();
  const [ref, { width, height }] = useSize();
  const open = (direction: 'receive' | 'transmit'): number =>
    groups
      .filter((group) => group.direction === direction)
      .flatMap(({ columns }) => columns)
      .filter(
        ({ closed }) => !closed.some(({ fromMs, toMs }) => fromMs <= instantMs && instantMs < toMs),
      ).length;
  return (
    <section
      aria-labelledby="sky"
      className="flex min-h-130 min-w-0 flex-col bg-surface drawer:min-h-0"
    >
      <div className="figures flex flex-wrap items-baseline gap-x-6 px-5 pt-3">
        <h2 id="sky" className="text-section font-semibold">
          Sky from {station.name} at {clockSeconds(instantMs)}
        </h2>
        <p className="ml-auto text-ink-muted">
          Receive beams <strong className="font-semibold text-ink">{sky.receiveBeams}</strong> of{' '}
          {open('receive')} open
        </p>
        <p className="text-ink-muted">
          Transmit beams <strong className="font-semibold text-ink">{sky.transmitBeams}</strong> of{' '}
          {open('transmit')} open
        </p>
      </div>
      <div
        ref={ref}
        className="relative flex min-h-0 flex-1 items-center justify-center overflow-hidden"
      >
        {ground && width > 0 && <Sheet sky={sky} pairs={pairs} width={width} height={height} />}
        <SkyLegend />
        {sky.error && (
          <div className="absolute inset-x-0 top-3 mx-auto w-fit">
            <ErrorNote error={sky.error} />
          </div>
        )}
      </div>
    </section>
  );
}

interface SheetProps {
  sky: SkyInstant;
  pairs: readonly BeamPair[];
  width: number;
  height: number;
}

const NAMES = 180;

function Sheet({ sky, pairs, width, height }: SheetProps) {
  const { ground } = usePlanDesk();
  const { instantMs, contactId, selectContact } = usePlanView();
  const [followed, setFollowed] = useState<string | null>(null);
  const radius = Math.round(Math.max(120, Math.min(width / 2 - NAMES, height / 2 - 34)));
  if (!ground) return null;
  const margin = {
    x: Math.max(40, width / 2 - radius),
    y: Math.max(30, Math.min(60, height / 2 - radius)),
  };
  // Six decibels more than needed: near enough to be worth a look.
  const near = pairs.filter((pair) => pair.isolationDb < pair.neededDb + 6).slice(0, 2);
  const selected =
    sky.beams.find(({ contact }) => contact.id === contactId)?.contact.passId ?? null;
  return (
    <SkySheet
      ground={ground}
      radius={radius}
      margin={margin}
      tracks={sky.tracks}
      instantMs={instantMs}
      interactive
      followed={followed ?? selected}
      label={`The sky at ${clockSeconds(instantMs)} UTC: ${counted(sky.beams.length, 'beam')} up${sky.beams.length > 0 ? `, ${sky.beams.map(({ contact }) => contact.satelliteName).join(', ')}` : ''}`}
    >
      <IdleMarks idle={sky.idle} instantMs={instantMs} radius={radius} />
      <SkyNames
        beams={sky.beams}
        radius={radius}
        reach={radius + (radius >= 180 ? 28 : 22)}
        onSelect={selectContact}
        onFollow={setFollowed}
      />
      {sky.beams.map((beam) => (
        <BeamMark
          key={beam.contact.id}
          beam={beam}
          radius={radius}
          selected={beam.contact.id === contactId}
          faded={followed !== null && followed !== beam.contact.passId}
          onSelect={() => selectContact(beam.contact.id)}
          onFollow={setFollowed}
        />
      ))}
      {near.map((pair) => (
        <ClosePair key={`${pair.a.contact.id} ${pair.b.contact.id}`} pair={pair} radius={radius} />
      ))}
    </SkySheet>
  );
}
