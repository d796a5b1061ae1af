import type { LineTaper } from '../../../shared/array/taper.ts';
import type { TaperInputs } from './table.ts';

export function taperOf({ taper, sll_db = 0, nbar = 2 }: TaperInputs): LineTaper {
  if (taper === 'taylor') return { kind: 'taylor', sidelobeDb: sll_db, nBar: nbar };
  if (taper === 'chebyshev') return { kind: 'chebyshev', sidelobeDb: sll_db };
  if (taper === 'cosine') return { kind: 'cosine', power: 1 };
  if (taper === 'cos2') return { kind: 'cosine', power: 2 };
  if (taper === 'uniform') return { kind: 'uniform' };
  throw new RangeError(`no taper ${taper}`);
}
