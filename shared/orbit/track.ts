/**
 * A track: where the satellite is in the station's east-north-up frame, as knots of position and velocity.
 * Contract first (plans, facts, charts and exports read tracks only through these functions).
 */
export interface Track {
  /** Instant of the first knot, ms UTC (may be fractional). */
  startMs: number;
  /** Distance of the knots, ms; <= 60,000. */
  stepMs: number;
  /** Six numbers a knot: east, north, up in km, then their rates in km/s. */
  knots: number[];
}
