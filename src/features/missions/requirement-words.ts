import type { Requirement } from '../../../shared/schemas/requirement.ts';

export const WHAT_WORDS: Record<Requirement['what'], string> = {
  contacts: 'Contacts',
  minutes: 'Contact time',
  gap: 'Longest gap',
  volume: 'Volume',
};
export const UNIT_WORDS: Record<Requirement['what'], string> = {
  contacts: '',
  minutes: 'min',
  gap: 'min',
  volume: 'Mbit',
};
export const UPLINK_WORDS: Record<Requirement['uplink'], string> = {
  required: 'required',
  wanted: 'wanted',
  none: 'none',
};

/** "at least 4", "at most 480 min", "4 to 9". */
export const amountWords = ({ what, least, most }: Requirement): string => {
  const unit = UNIT_WORDS[what] && ` ${UNIT_WORDS[what]}`;
  if (least !== null && most !== null) return `${least} to ${most}${unit}`;
  if (least !== null) return `at least ${least}${unit}`;
  return `at most ${most ?? 0}${unit}`;
};

const DAYS = ['Mon', 'Tue', 'Wed', 'Thu', 'Fri', 'Sat', 'Sun'];
const hour = (value: number): string => `${String(Math.floor(value)).padStart(2, '0')}:00`;

/** What else a contact must be to count for the line, in the order of importance. */
export const conditionWords = (line: Requirement): string =>
  [
    line.minimumDurationSeconds > 0 && `${line.minimumDurationSeconds} s or longer`,
    line.leastUplinkMinutes !== null && `uplink of ${line.leastUplinkMinutes} min`,
    line.minimumElevationDeg !== null && `reaching ${line.minimumElevationDeg}°`,
    line.marginFloorDb !== null && `margin ${line.marginFloorDb} dB`,
    line.scanLossLimitDb !== null && `scan loss within ${line.scanLossLimitDb} dB`,
    line.hoursUtc && `${hour(line.hoursUtc[0])} to ${hour(line.hoursUtc[1])} UTC`,
    line.weekdays && line.weekdays.map((day) => DAYS[day - 1] ?? '').join(' '),
  ]
    .filter(Boolean)
    .join(', ');
