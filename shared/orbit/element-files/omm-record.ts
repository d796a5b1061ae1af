/** One orbit mean-elements message as its keywords and texts, whatever the file form it came in. */

export interface OmmField {
  text: string;
  /** How the form wrote it: JSON tells numbers from texts, the other forms know texts only. */
  kind: 'text' | 'number' | 'null' | 'other';
  line: number;
  column: number;
}

export interface OmmRecord {
  /** Where the message begins, 1-based. */
  line: number;
  column: number;
  fields: ReadonlyMap<string, OmmField>;
}

/** Units as CCSDS 502.0-B-3 prints them; keywords without an entry have none. */
export const OMM_UNITS: Readonly<Record<string, string>> = {
  MEAN_MOTION: 'rev/day',
  INCLINATION: 'deg',
  RA_OF_ASC_NODE: 'deg',
  ARG_OF_PERICENTER: 'deg',
  MEAN_ANOMALY: 'deg',
  GM: 'km**3/s**2',
  SEMI_MAJOR_AXIS: 'km',
  BSTAR: '1/ER',
  BTERM: 'm**2/kg',
  MEAN_MOTION_DOT: 'rev/day**2',
  MEAN_MOTION_DDOT: 'rev/day**3',
  AGOM: 'm**2/kg',
};

/** Keywords in the order of tables 4-1 to 4-3 of CCSDS 502.0-B-3, with the block each stands in. */
export const OMM_KEYWORDS = {
  header: ['CLASSIFICATION', 'CREATION_DATE', 'ORIGINATOR', 'MESSAGE_ID'],
  metadata: [
    'OBJECT_NAME',
    'OBJECT_ID',
    'CENTER_NAME',
    'REF_FRAME',
    'REF_FRAME_EPOCH',
    'TIME_SYSTEM',
    'MEAN_ELEMENT_THEORY',
  ],
  meanElements: [
    'EPOCH',
    'SEMI_MAJOR_AXIS',
    'MEAN_MOTION',
    'ECCENTRICITY',
    'INCLINATION',
    'RA_OF_ASC_NODE',
    'ARG_OF_PERICENTER',
    'MEAN_ANOMALY',
    'GM',
  ],
  tleParameters: [
    'EPHEMERIS_TYPE',
    'CLASSIFICATION_TYPE',
    'NORAD_CAT_ID',
    'ELEMENT_SET_NO',
    'REV_AT_EPOCH',
    'BSTAR',
    'BTERM',
    'MEAN_MOTION_DOT',
    'MEAN_MOTION_DDOT',
    'AGOM',
  ],
} as const;

/** Versions of the standard that are read. */
export const OMM_VERSIONS: readonly string[] = ['2.0', '3.0'];
