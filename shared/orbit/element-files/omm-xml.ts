import type { OmmField, OmmRecord } from './omm-record.ts';
import { OMM_KEYWORDS, OMM_UNITS, OMM_VERSIONS } from './omm-record.ts';
import { FormFault, type Place } from './text-cursor.ts';
import { scanXml, type XmlElement } from './xml-text.ts';

const NAMESPACES = ['', 'urn:ccsds:schema:ndmxml'];

/** What may stand in what, in this order (NDM/XML schemas 2.0 and 3.0); null: passed over, it says nothing on the orbit. */
const CHILDREN: Readonly<Record<string, readonly string[] | null>> = {
  ndm: ['MESSAGE_ID', 'COMMENT', 'omm'],
  omm: ['header', 'body'],
  header: ['COMMENT', ...OMM_KEYWORDS.header],
  body: ['segment'],
  segment: ['metadata', 'data'],
  metadata: ['COMMENT', ...OMM_KEYWORDS.metadata],
  data: [
    'COMMENT',
    'meanElements',
    'spacecraftParameters',
    'tleParameters',
    'covarianceMatrix',
    'userDefinedParameters',
  ],
  meanElements: ['COMMENT', ...OMM_KEYWORDS.meanElements],
  tleParameters: ['COMMENT', ...OMM_KEYWORDS.tleParameters],
  spacecraftParameters: null,
  covarianceMatrix: null,
  userDefinedParameters: null,
};

const fail = ({ line, column }: Place, code: string, reason: string): never => {
  throw new FormFault({ line, column, code, reason });
};

function fieldOf(element: XmlElement): OmmField {
  const unit = element.attributes.get('units');
  const wanted = OMM_UNITS[element.name];
  if (unit !== undefined && unit !== wanted) {
    const reason = `The unit of ${element.name} is ${unit}; the standard wants ${wanted ?? 'none'}.`;
    fail(element, 'OMM_UNITS', reason);
  }
  const { line, column } = element;
  return { kind: 'text', text: element.text.trim(), line, column };
}

/** Walks a block, collecting keywords; unknown, repeated or misplaced elements are refused. */
function collect(element: XmlElement, fields: Map<string, OmmField>): void {
  const allowed = CHILDREN[element.name];
  if (allowed === null) return;
  if (element.text.trim() !== '')
    fail(element, 'XML_ELEMENT', `<${element.name}> holds text, but only elements belong there.`);
  let last = -1;
  for (const child of element.children) {
    if (!NAMESPACES.includes(child.namespace))
      fail(
        child,
        'XML_NAMESPACE',
        `<${child.name}> is in the namespace ${child.namespace}, not in that of CCSDS.`,
      );
    const place = allowed?.indexOf(child.name) ?? -1;
    if (place < 0 || place < last)
      fail(child, 'XML_ELEMENT', `<${child.name}> does not belong here in <${element.name}>.`);
    last = place;
    if (child.name === 'COMMENT') continue;
    if (child.name in CHILDREN) {
      collect(child, fields);
      continue;
    }
    if (fields.has(child.name))
      fail(child, 'OMM_DUPLICATE_KEY', `${child.name} stands there twice.`);
    fields.set(child.name, fieldOf(child));
  }
}

function recordOf(message: XmlElement): OmmRecord {
  const version = message.attributes.get('version') ?? '';
  if (message.attributes.get('id') !== 'CCSDS_OMM_VERS')
    fail(message, 'XML_ID', 'The attribute id of <omm> must be CCSDS_OMM_VERS.');
  if (!OMM_VERSIONS.includes(version)) {
    const reason = `The version is ${version || 'missing'}; ${OMM_VERSIONS.join(' and ')} are read.`;
    fail(message, 'OMM_VERSION', reason);
  }
  const fields = new Map<string, OmmField>();
  collect(message, fields);
  return { line: message.line, column: message.column, fields };
}

/** Orbit mean-elements messages in XML (CCSDS 505.0): one <omm>, or several inside <ndm>. */
export function ommRecordsOfXml(text: string): OmmRecord[] {
  const root = scanXml(text);
  if (root.name !== 'omm' && root.name !== 'ndm')
    fail(root, 'XML_ROOT', `The root element is <${root.name}>; <omm> or <ndm> is expected.`);
  if (!NAMESPACES.includes(root.namespace))
    fail(
      root,
      'XML_NAMESPACE',
      `The elements are in the namespace ${root.namespace}, not in that of CCSDS.`,
    );
  if (root.name === 'omm') return [recordOf(root)];
  const messages = root.children.filter(({ name }) => name === 'omm');
  const stranger = root.children.find(({ name }) => !CHILDREN.ndm?.includes(name));
  if (stranger) fail(stranger, 'XML_ELEMENT', `<${stranger.name}> does not belong here in <ndm>.`);
  if (messages.length === 0) fail(root, 'FILE_EMPTY', 'The file holds no <omm>.');
  return messages.map(recordOf);
}
