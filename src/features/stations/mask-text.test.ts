import { describe, expect, it } from 'vitest';
import { maskText, readMask } from './mask-text.ts';

describe('a pasted horizon mask', () => {
  it('is read from blanks, tabs, commas and semicolons, and written back', () => {
    const mask = [
      { azimuthDeg: 0, elevationDeg: 3 },
      { azimuthDeg: 90.5, elevationDeg: 4.25 },
      { azimuthDeg: 181, elevationDeg: -0.5 },
    ];
    expect(readMask('0 3\n90.5;4.25\r\n\n181\t-0.5\n')).toEqual(mask);
    expect(readMask('0, 3\n90.5, 4.25\n181, -0.5')).toEqual(mask);
    expect(readMask(maskText(mask))).toEqual(mask);
  });

  it('names the line that cannot be read', () => {
    expect(readMask('0 3\nnorth 5')).toBe('Line 2 is not a pair of azimuth and elevation');
    expect(readMask('0 3\n10 5 7')).toMatch(/Line 2/);
    expect(readMask('20 3\n20 5')).toBe('Line 2: the azimuth does not grow');
    expect(readMask(' \n')).toBe('At least one pair is needed');
  });
});
