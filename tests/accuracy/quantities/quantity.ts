import { ARRAY } from './array.ts';
import { BEAMS } from './beams.ts';
import { CAUTIONS } from './cautions.ts';
import { GEOMETRY } from './geometry.ts';
import { LINK } from './link.ts';
import { SCAN } from './scan.ts';
import { STATION } from './station.ts';
import type { QuantityTable } from './table.ts';

const QUANTITIES: QuantityTable = {
  ...GEOMETRY,
  ...ARRAY,
  ...SCAN,
  ...BEAMS,
  ...LINK,
  ...CAUTIONS,
  ...STATION,
};

/** The outputs of one quantity of the reference; undefined where the product has no use for it. */
export const quantity = (group: string, inputs: object): object | undefined =>
  // Each entry names the inputs its checks have; the check file is the contract.
  QUANTITIES[group]?.(inputs as never);
