import L from 'leaflet';
import { memo, useMemo } from 'react';
import { CircleMarker, Marker, Polygon, Polyline } from 'react-leaflet';
import type { GroundPoint } from '../../model/station-projection.ts';
import { coverageRing, elevationRing } from '../../model/coverage.ts';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import type { MapBeam, MapIdle, MapTrack } from '../../hooks/use-map-instant.ts';
import { latLng } from './station-crs.ts';
import { useLand } from './use-land.ts';

const still = { interactive: false } as const;

/** Coast lines and the net of meridians, under everything. */
export const Ground = memo(function Ground() {
  const land = useLand();
  const net = useMemo(() => {
    const lines: L.LatLngTuple[][] = [];
    for (let longitude = -180; longitude < 180; longitude += 15)
      lines.push(Array.from({ length: 35 }, (_, i) => [-85 + i * 5, longitude]));
    for (let latitude = -75; latitude <= 75; latitude += 15)
      lines.push(Array.from({ length: 73 }, (_, i) => [latitude, -180 + i * 5]));
    return lines;
  }, []);
  return (
    <>
      <Polyline {...still} positions={net} pathOptions={{ color: 'var(--rule-soft)', weight: 1 }} />
      <Polygon
        {...still}
        positions={land}
        pathOptions={{
          color: 'var(--iso)',
          weight: 0.7,
          opacity: 0.75,
          fillColor: 'var(--land)',
          fillOpacity: 0.55,
        }}
      />
    </>
  );
});

interface CoverageProps {
  /** Heights of the satellites in view, km: one limit line each. */
  heightsKm: readonly number[];
}

/** The limit of the day on the ground, for satellites of a height; outside the widest everything is shaded. */
export const Coverage = memo(function Coverage({ heightsKm }: CoverageProps) {
  const { station, faces, plan } = usePlanDesk();
  const rings = heightsKm.map((heightKm) => ({
    heightKm,
    rings: faces.map((face) =>
      coverageRing({ station, face, limitDb: plan.limitOfDayDb }, heightKm).map(latLng),
    ),
  }));
  const first = heightsKm[0] ?? 600;
  const shade = rings[0]?.rings ?? [];
  const world = elevationRing(station, -60, first).map(latLng);
  return (
    <>
      <Polygon
        {...still}
        positions={[world, ...shade]}
        pathOptions={{
          stroke: false,
          fillColor: 'var(--shade)',
          fillOpacity: 0.62,
          fillRule: 'evenodd',
        }}
      />
      {[0, 30, 60].map((elevation) => (
        <Polyline
          {...still}
          key={elevation}
          positions={elevationRing(station, elevation, first).map(latLng)}
          pathOptions={{ color: 'var(--ink-faint)', weight: 0.9, dashArray: '1 4' }}
        />
      ))}
      {[30, 60].map((elevation) => (
        <Words
          key={elevation}
          at={elevationRing(station, elevation, first)[65] ?? station}
          words={`${elevation}°`}
          muted
        />
      ))}
      {rings.map(({ heightKm, rings: own }, index) => (
        <Polygon
          {...still}
          key={heightKm}
          smoothFactor={0.3}
          positions={own}
          pathOptions={{
            color: 'var(--ink)',
            weight: index === 0 ? 1.6 : 1,
            fill: false,
            ...(index === 0 ? {} : { dashArray: '6 4', color: 'var(--ink-muted)' }),
          }}
        />
      ))}
    </>
  );
});

/** Ground tracks: a pass dotted, its contacts solid. */
export const Tracks = memo(function Tracks({ tracks }: { tracks: readonly MapTrack[] }) {
  return (
    <>
      {tracks.map(({ id, color, path }) => (
        <Polyline
          {...still}
          key={id}
          positions={path.map(latLng)}
          pathOptions={{ color: color ?? 'var(--ink-faint)', weight: 1.2, dashArray: '1 4' }}
        />
      ))}
      {tracks.flatMap(({ id, color, contacts }) =>
        contacts.map((contact, index) => (
          <Polyline
            {...still}
            key={`${id} ${index}`}
            positions={contact.map(latLng)}
            pathOptions={{ color: color ?? 'var(--ink-faint)', weight: 2 }}
          />
        )),
      )}
    </>
  );
});

interface BeamsProps {
  beams: readonly MapBeam[];
  selectedId: string | null;
  onSelect: (contactId: string) => void;
}

/** Beams at the satellites' height: footprint, the line from the station, the point under the satellite. */
export function Beams({ beams, selectedId, onSelect }: BeamsProps) {
  const { station } = usePlanDesk();
  return (
    <>
      {beams.map(({ beam, footprint }) => {
        const { color, contact } = beam;
        const chosen = contact.id === selectedId;
        return (
          <Polygon
            key={contact.id}
            smoothFactor={0.2}
            positions={footprint.map(latLng)}
            pathOptions={{
              color: chosen ? 'var(--accent)' : color,
              weight: chosen ? 3 : 1.6,
              fillColor: color,
              fillOpacity: 0.25,
            }}
            eventHandlers={{ click: () => onSelect(contact.id) }}
          />
        );
      })}
      {beams.map(({ beam, at }) => (
        <Polyline
          {...still}
          key={beam.contact.id}
          positions={[latLng(station), latLng(at)]}
          pathOptions={{ color: beam.color, weight: 1 }}
        />
      ))}
      {beams.map(({ beam, at }) => (
        <CircleMarker
          {...still}
          key={beam.contact.id}
          center={latLng(at)}
          radius={3}
          pathOptions={{ color: beam.color, fillColor: beam.color, fillOpacity: 1, weight: 1 }}
        />
      ))}
      {beams.map(({ beam, at }) => (
        <Words key={beam.contact.id} at={at} words={beam.contact.satelliteName} strong />
      ))}
    </>
  );
}

export function Idle({ idle }: { idle: readonly MapIdle[] }) {
  return (
    <>
      {idle.map(({ passId, at }) => (
        <CircleMarker
          {...still}
          key={passId}
          center={latLng(at)}
          radius={4}
          pathOptions={{
            color: 'var(--ink-muted)',
            weight: 1.2,
            fillColor: 'var(--sheet)',
            fillOpacity: 1,
          }}
        />
      ))}
      {idle.map(({ passId, name, at }) => (
        <Words key={passId} at={at} words={name} muted />
      ))}
    </>
  );
}

export function StationMark() {
  const { station } = usePlanDesk();
  return (
    <>
      <CircleMarker
        {...still}
        center={latLng(station)}
        radius={6}
        pathOptions={{
          color: 'var(--ink)',
          weight: 1.6,
          fillColor: 'var(--sheet)',
          fillOpacity: 1,
        }}
      />
      <CircleMarker
        {...still}
        center={latLng(station)}
        radius={2}
        pathOptions={{ color: 'var(--ink)', weight: 1, fillColor: 'var(--ink)', fillOpacity: 1 }}
      />
      <Words at={station} words={station.name} strong />
    </>
  );
}

const escapeHtml = (text: string): string =>
  text.replace(/[&<>"']/g, (sign) => `&#${sign.charCodeAt(0)};`);

function Words({
  at,
  words,
  strong,
  muted,
}: {
  at: GroundPoint;
  words: string;
  strong?: boolean;
  muted?: boolean;
}) {
  const icon = useMemo(
    () =>
      L.divIcon({
        className: `plan-map-words${strong ? ' is-strong' : ''}${muted ? ' is-muted' : ''}`,
        html: escapeHtml(words),
        iconSize: [0, 0],
      }),
    [words, strong, muted],
  );
  return <Marker position={latLng(at)} icon={icon} interactive={false} keyboard={false} />;
}
