import type { ElementFault, ReadElementSet } from '../element-set.ts';

function duplicateFault(
  set: ReadElementSet,
  known: ReadElementSet | undefined,
): ElementFault | null {
  if (!known) return null;
  const isSame = known.line1 === set.line1 && known.line2 === set.line2;
  const reason = isSame
    ? `The same set stands in line ${known.line} already; that one is used. Remove this one.`
    : `Line ${known.line} gives another orbit for the same object and epoch; remove one of the two.`;
  return { line: set.line, column: 1, code: 'DUPLICATE_SET', reason };
}

/** Parts what was read into sets and faults in the order of the file; of sets for one object and epoch the first counts. */
export function collectSets(results: Iterable<ReadElementSet | ElementFault>): {
  accepted: ReadElementSet[];
  refused: ElementFault[];
} {
  const accepted = new Map<string, ReadElementSet>();
  const refused: ElementFault[] = [];
  for (const result of results) {
    const fault =
      'code' in result
        ? result
        : duplicateFault(result, accepted.get(`${result.catalogNumber} ${result.epochMs}`));
    if (fault) refused.push(fault);
    else if (!('code' in result)) accepted.set(`${result.catalogNumber} ${result.epochMs}`, result);
  }
  refused.sort((a, b) => a.line - b.line || a.column - b.column);
  return { accepted: [...accepted.values()], refused };
}
