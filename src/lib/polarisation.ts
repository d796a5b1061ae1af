const WORDS: Record<string, string> = {
  rhcp: 'right-hand',
  lhcp: 'left-hand',
  linear: 'linear',
  both: 'both hands',
};
export const polarisationWord = (polarisation: string): string =>
  WORDS[polarisation] ?? polarisation;
