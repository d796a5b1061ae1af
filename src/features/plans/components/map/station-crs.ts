import L from 'leaflet';
import {
  MAP_EARTH_KM,
  arcAndBearing,
  destination,
  type GroundPoint,
} from '../../model/station-projection.ts';

/** What lies farther is drawn on this circle: near the antipode the projection tears everything apart. */
const MOST_KM = 14_500;
/** Kilometres of a pixel at zoom 0. */
const KM_PER_PX = 20;

/**
 * Azimuthal equidistant around the station, so that a bearing on the map is the beam's azimuth and distances from
 * the station are true.
 */
export function stationCrs(station: GroundPoint): L.CRS {
  const projection: L.Projection = {
    bounds: L.bounds([-MOST_KM, -MOST_KM], [MOST_KM, MOST_KM]),
    project: ({ lat, lng }) => {
      const { arc, bearing } = arcAndBearing(station, { latitudeDeg: lat, longitudeDeg: lng });
      const km = Math.min(MOST_KM, arc * MAP_EARTH_KM);
      return L.point(km * Math.sin(bearing), km * Math.cos(bearing));
    },
    unproject: (at) => {
      const { x, y } = L.point(at);
      const arc = Math.min(MOST_KM, Math.hypot(x, y)) / MAP_EARTH_KM;
      const to = destination(station, arc, Math.atan2(x, y));
      return L.latLng(to.latitudeDeg, to.longitudeDeg);
    },
  };
  // Leaflet builds its own systems by extending L.CRS in this way; its types know no other door.
  return L.Util.extend({}, L.CRS, {
    code: 'station',
    projection,
    transformation: new L.Transformation(1 / KM_PER_PX, 0, -1 / KM_PER_PX, 0),
    scale: (zoom: number) => 2 ** zoom,
    zoom: (scale: number) => Math.log2(scale),
    distance: (a: L.LatLng, b: L.LatLng) =>
      arcAndBearing(
        { latitudeDeg: a.lat, longitudeDeg: a.lng },
        { latitudeDeg: b.lat, longitudeDeg: b.lng },
      ).arc *
      MAP_EARTH_KM *
      1000,
    infinite: true,
  }) as unknown as L.CRS;
}

/** The view in which points fill a window: its middle and zoom. */
export function viewOf(
  crs: L.CRS,
  points: readonly GroundPoint[],
  window: { width: number; height: number },
): { center: L.LatLng; zoom: number } {
  const projected = points.map((point) => crs.latLngToPoint(L.latLng(latLng(point)), 0));
  const bounds = L.bounds(projected);
  const { x: width, y: height } = bounds.getSize();
  const room = Math.min(window.width / Math.max(1, width), window.height / Math.max(1, height));
  return { center: crs.pointToLatLng(bounds.getCenter(), 0), zoom: Math.log2(room * 0.86) };
}

export const latLng = ({ latitudeDeg, longitudeDeg }: GroundPoint): L.LatLngTuple => [
  latitudeDeg,
  longitudeDeg,
];
