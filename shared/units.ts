/**
 * Units. Every name that carries a physical value ends in its unit (`elevationDeg`, `rangeKm`, `scanLossDb`);
 * conversions happen only through the functions of this file. Losses are positive dB.
 */

const DEGREES_PER_RADIAN = 180 / Math.PI;

export const toRadians = (deg: number): number => deg / DEGREES_PER_RADIAN;
export const toDegrees = (rad: number): number => rad * DEGREES_PER_RADIAN;

/** Ratio of powers to decibels. */
export const powerToDb = (ratio: number): number => 10 * Math.log10(ratio);
/** Decibels to a ratio of powers. */
export const dbToPower = (db: number): number => 10 ** (db / 10);

/** An angle brought into 0 <= a < 360. */
export const wrapDegrees = (deg: number): number => ((deg % 360) + 360) % 360;
