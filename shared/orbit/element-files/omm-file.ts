import { collectSets } from './collect-sets.ts';
import type { ElementFault, ElementFormat, ElementSetReading } from '../element-set.ts';
import { ommRecordsOfCsv } from './omm-csv.ts';
import { ommRecordsOfJson } from './omm-json.ts';
import { ommRecordsOfKvn } from './omm-kvn.ts';
import type { OmmRecord } from './omm-record.ts';
import { readOmmRecord, type OmmOrigin } from './omm-set.ts';
import { ommRecordsOfXml } from './omm-xml.ts';
import { scanned } from './text-cursor.ts';

export type OmmFormat = Exclude<ElementFormat, 'tle'>;

const FORMS: Record<
  OmmFormat,
  { recordsOf: (text: string) => (OmmRecord | ElementFault)[]; origin: OmmOrigin }
> = {
  'omm-json': { recordsOf: ommRecordsOfJson, origin: 'convention' },
  'omm-csv': { recordsOf: ommRecordsOfCsv, origin: 'convention' },
  'omm-kvn': { recordsOf: ommRecordsOfKvn, origin: 'message' },
  'omm-xml': { recordsOf: ommRecordsOfXml, origin: 'message' },
};

/** Reads orbit mean-elements messages in one of their file forms; a fault of the form makes the file unreadable. */
export function readOmmText(text: string, format: OmmFormat): ElementSetReading {
  const { recordsOf, origin } = FORMS[format];
  const scan = scanned(() => recordsOf(text));
  if ('fault' in scan) return { format, accepted: [], refused: [scan.fault], unreadable: true };
  const results = scan.value.map((record) =>
    'code' in record ? record : readOmmRecord(record, origin),
  );
  return { format, ...collectSets(results), unreadable: false };
}
