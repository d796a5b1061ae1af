/** A short head over each refusal; the reason itself comes from the server. */
const TITLES: Record<string, string> = {
  DUPLICATE_SET: 'The same set twice',
  EPHEMERIS_TYPE: 'Not an SGP4 set',
  EPOCH_RANGE: 'Epoch out of range',
  EPOCH_TOO_FAR_AHEAD: 'Epoch in the future',
  EPOCH_TOO_OLD: 'Epoch too old',
  FILE_BINARY: 'Not a text file',
  FILE_EMPTY: 'Empty file',
  FILE_ENCODING: 'Characters of another encoding',
  FILE_TOO_LARGE: 'File too large',
  FILE_TYPE: 'Another kind of file',
  NOT_YOURS: 'Not a satellite of yours',
  PROPAGATION_FAILED: 'Propagation fails',
  TLE_CATALOG: 'Catalogue number not readable',
  TLE_CATALOG_MISMATCH: 'Lines of two satellites',
  TLE_CHARACTERS: 'A character that does not belong',
  TLE_CHECKSUM: 'Checksum does not match',
  TLE_COLUMNS: 'Columns shifted',
  TLE_EXPONENT: 'Number with exponent not readable',
  TLE_LENGTH: 'Line of another length',
  TLE_LINE_NUMBER: 'Line number wrong',
  TLE_NAME: 'Name line not usable',
  TLE_NUMBER: 'Number not readable',
  TLE_STRUCTURE: 'Lines out of order',
};

export const titleOfRefusal = (code: string): string =>
  TITLES[code] ?? (code.startsWith('RANGE_') ? 'Value out of range' : 'Refused');
