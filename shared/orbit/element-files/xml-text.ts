import { TextCursor, type Place } from './text-cursor.ts';

/** An element of an XML text with its place; namespaces are resolved. */
export interface XmlElement extends Place {
  name: string;
  /** Empty when the element is in none. */
  namespace: string;
  attributes: ReadonlyMap<string, string>;
  children: XmlElement[];
  /** Character data directly inside, joined. */
  text: string;
}

const NAME = /[A-Za-z_][\w.-]*(:[A-Za-z_][\w.-]*)?/y;
const BLANKS = /[ \t\r\n]*/y;
const TEXT = /[^<&]+/y;
const ENTITY = /&(lt|gt|amp|quot|apos|#\d{1,7}|#x[0-9A-Fa-f]{1,6});/y;
const NAMED: Readonly<Record<string, string>> = {
  lt: '<',
  gt: '>',
  amp: '&',
  quot: '"',
  apos: "'",
};
const DEEPEST = 32;

function scanEntity(cursor: TextCursor): string {
  const entity = cursor.takeMatch(ENTITY).slice(1, -1);
  if (entity === '')
    cursor.fail('XML_SYNTAX', 'This entity is not known in XML; write the character itself.');
  const named = NAMED[entity];
  if (named !== undefined) return named;
  const code = entity.startsWith('#x') ? parseInt(entity.slice(2), 16) : Number(entity.slice(1));
  if (code > 0x10ffff) cursor.fail('XML_SYNTAX', 'This character number does not exist.');
  return String.fromCodePoint(code);
}

function scanAttribute(cursor: TextCursor): [string, string] {
  const name = cursor.takeMatch(NAME);
  if (name === '') cursor.fail('XML_SYNTAX', 'An attribute name is expected here.');
  cursor.takeMatch(BLANKS);
  if (cursor.take() !== '=') cursor.fail('XML_SYNTAX', `An equals sign must follow ${name}.`);
  cursor.takeMatch(BLANKS);
  const quote = cursor.take();
  if (quote !== '"' && quote !== "'")
    cursor.fail('XML_SYNTAX', `The value of ${name} must be quoted.`);
  let value = '';
  while (cursor.peek() !== quote) {
    if (cursor.isAtEnd || cursor.peek() === '<')
      cursor.fail('XML_SYNTAX', `The value of ${name} is never closed.`);
    value += cursor.peek() === '&' ? scanEntity(cursor) : cursor.take();
  }
  cursor.take();
  return [name, value];
}

/** Passes comments and processing instructions; refuses document types, which can pull in other files. */
function skipAside(cursor: TextCursor): boolean {
  const pairs = [
    ['<!--', '-->'],
    ['<?', '?>'],
  ] as const;
  if (/^<!doctype/i.test(cursor.peek(9)))
    cursor.fail('XML_DOCTYPE', 'The file has a document type declaration; remove it.');
  for (const [open, close] of pairs) {
    if (cursor.peek(open.length) !== open) continue;
    const end = cursor.text.indexOf(close, cursor.index + open.length);
    if (end < 0) cursor.fail('XML_SYNTAX', `${open} is never closed.`);
    cursor.take(end + close.length - cursor.index);
    return true;
  }
  return false;
}

interface Scope {
  depth: number;
  namespaces: ReadonlyMap<string, string>;
}

/** Namespaces of an element: those around it and its own declarations. */
function scopeOf(attributes: ReadonlyMap<string, string>, outer: Scope): Scope {
  const namespaces = new Map(outer.namespaces);
  for (const [name, value] of attributes) {
    if (name === 'xmlns') namespaces.set('', value);
    else if (name.startsWith('xmlns:')) namespaces.set(name.slice(6), value);
  }
  return { depth: outer.depth + 1, namespaces };
}

function scanContent(cursor: TextCursor, element: XmlElement, tag: string, scope: Scope): void {
  for (;;) {
    if (cursor.isAtEnd) cursor.fail('XML_SYNTAX', `<${tag}> is never closed.`, element);
    if (cursor.peek(2) === '</') break;
    if (skipAside(cursor)) continue;
    if (cursor.peek() === '&') element.text += scanEntity(cursor);
    else if (cursor.peek() === '<') element.children.push(scanElement(cursor, scope));
    else element.text += cursor.takeMatch(TEXT);
  }
  const { place } = cursor;
  cursor.take(2);
  const closing = cursor.takeMatch(NAME);
  cursor.takeMatch(BLANKS);
  if (closing !== tag || cursor.take() !== '>')
    cursor.fail(
      'XML_SYNTAX',
      `</${closing}> closes an element that was opened as <${tag}>.`,
      place,
    );
}

function scanElement(cursor: TextCursor, outer: Scope): XmlElement {
  const { place } = cursor;
  if (outer.depth > DEEPEST) cursor.fail('XML_SYNTAX', 'The elements are nested too deeply.');
  cursor.take();
  const tag = cursor.takeMatch(NAME);
  if (tag === '') cursor.fail('XML_SYNTAX', 'An element name is expected here.', place);
  const attributes = new Map<string, string>();
  while (cursor.takeMatch(BLANKS) !== '' && !/[/>]/.test(cursor.peek())) {
    const [name, value] = scanAttribute(cursor);
    if (attributes.has(name))
      cursor.fail('XML_SYNTAX', `The attribute ${name} stands there twice.`);
    attributes.set(name, value);
  }
  const scope = scopeOf(attributes, outer);
  const [prefix, name] = tag.includes(':') ? tag.split(':') : ['', tag];
  const namespace = scope.namespaces.get(prefix ?? '');
  if (namespace === undefined)
    cursor.fail('XML_NAMESPACE', `The prefix ${prefix} is not declared.`, place);
  const element: XmlElement = {
    ...place,
    name: name ?? tag,
    namespace,
    attributes,
    children: [],
    text: '',
  };
  if (cursor.peek(2) === '/>') cursor.take(2);
  else if (cursor.take() === '>') scanContent(cursor, element, tag, scope);
  else cursor.fail('XML_SYNTAX', `<${tag}> is not closed by >.`);
  return element;
}

/** Scans a whole XML text, without entities of its own and without outside references; throws a `FormFault`. */
export function scanXml(text: string): XmlElement {
  const cursor = new TextCursor(text);
  cursor.takeMatch(BLANKS);
  while (skipAside(cursor)) cursor.takeMatch(BLANKS);
  if (cursor.peek() !== '<') cursor.fail('XML_SYNTAX', 'An element is expected here.');
  const root = scanElement(cursor, { depth: 0, namespaces: new Map([['', '']]) });
  cursor.takeMatch(BLANKS);
  while (skipAside(cursor)) cursor.takeMatch(BLANKS);
  if (!cursor.isAtEnd) cursor.fail('XML_SYNTAX', 'Something follows the end of the root element.');
  return root;
}
