import 'leaflet/dist/leaflet.css';
import './plan-map.css';
import L from 'leaflet';
import { useMemo, useState } from 'react';
import { MapContainer, ZoomControl } from 'react-leaflet';
import { Segmented } from '../../../../components/segmented.tsx';
import { decimals } from '../../../../lib/format-number.ts';
import { ErrorNote } from '../../../../components/states.tsx';
import { useSize } from '../../../../hooks/use-size.ts';
import { coverageRing, elevationRing } from '../../model/coverage.ts';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import { usePlanView } from '../../hooks/plan-view.ts';
import { useMapInstant } from '../../hooks/use-map-instant.ts';
import { useSkyInstant } from '../../hooks/use-sky-instant.ts';
import { Inspector } from '../inspector/inspector.tsx';
import { InstantBar } from '../sky/instant-bar.tsx';
import { BeamList } from './beam-list.tsx';
import { Beams, Coverage, Ground, Idle, StationMark, Tracks } from './map-layers.tsx';
import { stationCrs, viewOf } from './station-crs.ts';

/** The instant seen from above: ground tracks, beams, and where satellites can be served. */
export function PlanMap() {
  const { instantMs, contactId, passId } = usePlanView();
  const sky = useSkyInstant(instantMs);
  return (
    <>
      <div className="grid min-h-0 flex-1 drawer:grid-cols-[minmax(0,1fr)_25rem]">
        <MapPanel sky={sky} />
        <div className="min-h-0 min-w-0 border-line drawer:border-l">
          {contactId || passId ? <Inspector /> : <BeamList sky={sky} />}
        </div>
      </div>
      <InstantBar />
    </>
  );
}

type Extent = 'region' | 'world';

function MapPanel({ sky }: { sky: ReturnType<typeof useSkyInstant> }) {
  const [extent, setExtent] = useState<Extent>('region');
  const [ref, size] = useSize();
  const { instantMs } = usePlanView();
  const instant = useMapInstant(sky, instantMs);
  const heightsKm = useHeights(instant.beams.map(({ heightKm }) => heightKm));
  return (
    <section
      ref={ref}
      aria-label="Map around the station"
      className="plan-map relative isolate min-h-120 min-w-0 drawer:min-h-0"
    >
      {size.width > 0 && (
        <StationMap
          key={extent}
          extent={extent}
          window={size}
          instant={instant}
          heightsKm={heightsKm}
        />
      )}
      <div className="absolute top-3 right-14 z-[500]">
        <Segmented
          label="Extent of the map"
          size="small"
          value={extent}
          onChange={setExtent}
          options={[
            { value: 'region', label: 'Region' },
            { value: 'world', label: 'World' },
          ]}
        />
      </div>
      <MapLegend heightsKm={heightsKm} />
      {sky.error && (
        <div className="absolute inset-x-0 top-3 z-[500] mx-auto w-fit">
          <ErrorNote error={sky.error} />
        </div>
      )}
    </section>
  );
}

interface MapProps {
  extent: Extent;
  window: { width: number; height: number };
  instant: ReturnType<typeof useMapInstant>;
  heightsKm: readonly number[];
}

function StationMap({ extent, window, instant, heightsKm }: MapProps) {
  const { station, faces, plan } = usePlanDesk();
  const { contactId, selectContact } = usePlanView();
  const crs = useMemo(() => stationCrs(station), [station]);
  // Only the first view is computed; afterwards the hand moves it.
  const [view] = useState(() => {
    const heightKm = heightsKm.at(-1) ?? 600;
    const region = faces.flatMap((face) =>
      coverageRing({ station, face, limitDb: plan.limitOfDayDb }, heightKm),
    );
    const points = extent === 'region' ? [...region, station] : elevationRing(station, -50, 8000);
    return viewOf(crs, points, window);
  });
  return (
    <MapContainer
      crs={crs}
      center={view.center}
      zoom={view.zoom}
      minZoom={-1.5}
      maxZoom={6}
      zoomSnap={0}
      zoomDelta={0.5}
      zoomControl={false}
      attributionControl={false}
      renderer={RENDERER}
      className="absolute inset-0"
    >
      <Ground />
      <Coverage heightsKm={heightsKm} />
      <Tracks tracks={instant.tracks} />
      <StationMark />
      <Idle idle={instant.idle} />
      <Beams beams={instant.beams} selectedId={contactId} onSelect={selectContact} />
      <ZoomControl position="topright" />
    </MapContainer>
  );
}

// Padding: what is dragged in at the edge is drawn already.
const RENDERER = L.svg({ padding: 0.4 });

/** Lowest and highest of the satellites in view, in steps of 50 km, so that the lines rest while they move. */
function useHeights(heights: readonly number[]): readonly number[] {
  const rounded = [...new Set(heights.map((km) => Math.round(km / 50) * 50))].sort((a, b) => a - b);
  const key = rounded.length > 2 ? [rounded[0], rounded.at(-1)].join() : rounded.join();
  return useMemo(() => (key === '' ? [600] : key.split(',').map(Number)), [key]);
}

function MapLegend({ heightsKm }: { heightsKm: readonly number[] }) {
  const { plan } = usePlanDesk();
  return (
    <div className="absolute bottom-3 left-3 z-[500] rounded-panel border border-line bg-surface px-3.5 py-2.5 text-caption">
      <p className="mb-1 font-semibold">
        Within {decimals(plan.limitOfDayDb, 1)} dB of scan loss and above the mask
      </p>
      {heightsKm.map((heightKm, index) => (
        <p key={heightKm} className="figures flex items-center gap-2 text-ink-muted">
          <svg width="28" height="8" aria-hidden="true">
            <path
              d="M0 4H28"
              stroke="var(--ink)"
              strokeWidth={index === 0 ? 1.6 : 1}
              strokeDasharray={index === 0 ? undefined : '6 4'}
            />
          </svg>
          for satellites at {heightKm} km
        </p>
      ))}
      <p className="figures flex items-center gap-2 text-ink-muted">
        <svg width="28" height="8" aria-hidden="true">
          <path d="M0 4H28" stroke="var(--ink-faint)" strokeDasharray="1 4" />
        </svg>
        elevation of a satellite at {heightsKm[0]} km
      </p>
    </div>
  );
}
