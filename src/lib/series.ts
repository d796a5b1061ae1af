/** The place of a mission in the list of colours; from the seventh on a second form (dashed) of a colour. */
export const seriesColor = (series: number): string => `var(--series-${((series - 1) % 6) + 1})`;
export const isSecondForm = (series: number): boolean => series > 6;
