import { anglesOf, directionOf } from '../../../shared/array/direction.ts';
import {
  directionFromFace,
  directionOnFace,
  faceAxes,
} from '../../../shared/array/face-geometry.ts';
import { toDegrees } from '../../../shared/units.ts';
import { angleBetween } from '../../../shared/vector.ts';
import type { QuantityTable } from './table.ts';

export interface FaceInputs {
  az0_deg: number;
  el0_deg: number;
  roll_deg: number;
}
export const orientationOf = ({ az0_deg, el0_deg, roll_deg }: FaceInputs) => ({
  boresightAzimuthDeg: az0_deg,
  boresightElevationDeg: el0_deg,
  rollDeg: roll_deg,
});
const anglesNamed = ({ azimuthDeg, elevationDeg }: ReturnType<typeof anglesOf>) => ({
  az_deg: azimuthDeg,
  el_deg: elevationDeg,
});

export const GEOMETRY: QuantityTable = {
  'GEO-UNIT': ({ az_deg, el_deg }: { az_deg: number; el_deg: number }) => {
    const [e, n, u] = directionOf(az_deg, el_deg);
    return { e, n, u };
  },
  'GEO-AZEL': ({ e, n, u }: { e: number; n: number; u: number }) =>
    anglesNamed(anglesOf([e, n, u])),
  'GEO-AXES': (inputs: FaceInputs) => {
    const { u, v, normal } = faceAxes(orientationOf(inputs));
    return { u_axis: u, v_axis: v, normal };
  },
  'GEO-UV': (inputs: FaceInputs & { az_deg: number; el_deg: number }) => {
    const on = directionOnFace(orientationOf(inputs), directionOf(inputs.az_deg, inputs.el_deg));
    const phi_deg = toDegrees(Math.atan2(on.v, on.u));
    return { u: on.u, v: on.v, w: on.w, theta_deg: toDegrees(on.scanAngleRad), phi_deg };
  },
  'GEO-UVINV': (inputs: FaceInputs & { u: number; v: number }) => {
    const direction = directionFromFace(faceAxes(orientationOf(inputs)), inputs.u, inputs.v);
    return direction ? anglesNamed(anglesOf(direction)) : { az_deg: null, el_deg: null };
  },
  'GEO-ANG': (one: { az1_deg: number; el1_deg: number; az2_deg: number; el2_deg: number }) => {
    const [a, b] = [directionOf(one.az1_deg, one.el1_deg), directionOf(one.az2_deg, one.el2_deg)];
    return { angle_deg: toDegrees(angleBetween(a, b)) };
  },
};
