import { useQuery } from '@tanstack/react-query';
import type { LatLngTuple } from 'leaflet';
import { feature } from 'topojson-client';
import type { GeometryCollection, Topology } from 'topojson-specification';

type Ring = LatLngTuple[];
/** Longest piece of a coast line, deg: longer ones would cut corners in a projection that bends them. */
const PIECE_DEG = 2;

/** Land as rings of latitude and longitude, from the atlas that ships with the client; no network beyond it. */
export function useLand(): Ring[][] {
  return (
    useQuery({
      queryKey: ['land'],
      queryFn: async () => {
        const atlas = await import('world-atlas/land-50m.json');
        // The package ships TopoJSON without types.
        const topology = atlas.default as unknown as Topology<{ land: GeometryCollection }>;
        return polygonsOf(topology);
      },
      staleTime: Infinity,
    }).data ?? []
  );
}

function polygonsOf(topology: Topology<{ land: GeometryCollection }>): Ring[][] {
  const land = feature(topology, topology.objects.land);
  return land.features.flatMap(({ geometry }) => {
    if (geometry.type === 'Polygon') return [geometry.coordinates.map(ringOf)];
    if (geometry.type === 'MultiPolygon') return geometry.coordinates.map((one) => one.map(ringOf));
    return [];
  });
}

function ringOf(coordinates: number[][]): Ring {
  const ring: Ring = [];
  for (const [index, [longitude = 0, latitude = 0]] of coordinates.entries()) {
    const before = coordinates[index - 1];
    const [lonBefore = longitude, latBefore = latitude] = before ?? [];
    const apart = Math.max(Math.abs(longitude - lonBefore), Math.abs(latitude - latBefore));
    // A jump across the 180th meridian is no coast.
    const pieces = apart > 180 ? 1 : Math.ceil(apart / PIECE_DEG);
    for (let piece = 1; piece < pieces; piece++)
      ring.push([
        latBefore + ((latitude - latBefore) * piece) / pieces,
        lonBefore + ((longitude - lonBefore) * piece) / pieces,
      ]);
    ring.push([latitude, longitude]);
  }
  return ring;
}
