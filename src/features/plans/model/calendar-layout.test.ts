import { describe, expect, it } from 'vitest';
import type { ColumnGroup, PlanColumn } from './columns.ts';
import { layoutCalendar, ruleSteps } from './calendar-layout.ts';

const column = (label: string, closed: PlanColumn['closed'] = []): PlanColumn =>
  // Only what the layout looks at.
  ({ id: label, channel: { label }, closed }) as unknown as PlanColumn;
const group = (
  key: string,
  direction: 'receive' | 'transmit',
  columns: PlanColumn[],
): ColumnGroup => ({
  key,
  title: key,
  direction,
  columns,
});
const stretch = { fromMs: 1000, toMs: 5000 };
const wholeDay = { id: 'x', fromMs: 0, toMs: 9000, reason: 'repair', untilFurtherNotice: false };

const ask = (groups: ColumnGroup[], width: number, occupied: string[], unfolded: string[] = []) =>
  layoutCalendar({
    groups,
    stretch,
    width,
    occupied: new Set(occupied),
    unfolded: new Set(unfolded),
    closedWords: ({ channel }) => `${channel.label} closed`,
  });

describe('columns of the calendar', () => {
  const receive = group(
    'r',
    'receive',
    ['R1', 'R2', 'R3', 'R4'].map((label) => column(label)),
  );
  const transmit = group('t', 'transmit', [column('T1'), column('T2', [wholeDay])]);

  it('keeps empty columns while there is room, and folds what is closed all through', () => {
    const { items, width } = ask([receive, transmit], 800, ['R1', 'T1']);
    expect(items.map(({ id, kind }) => `${id} ${kind}`)).toEqual([
      'R1 column',
      'R2 column',
      'R3 column',
      'R4 column',
      'T1 column',
      'T2 rail',
    ]);
    expect(width).toBeCloseTo(800);
  });

  it('folds neighbours that hold nothing into one rail when it becomes narrow', () => {
    const { items } = ask([receive, transmit], 290, ['R1', 'R4', 'T1']);
    expect(items.map(({ label, kind }) => `${label} ${kind}`)).toEqual([
      'R1 column',
      '2–3 rail',
      'R4 column',
      'T1 column',
      'T2 rail',
    ]);
    expect(items[1]?.words).toBe('R2 to R3 hold nothing in these hours');
  });

  it('opens a rail by hand and keeps a closed column that holds a contact', () => {
    const { items } = ask([transmit], 300, ['T1', 'T2']);
    expect(items.every(({ kind }) => kind === 'column')).toBe(true);
    const opened = ask([transmit], 300, ['T1'], ['T2']);
    expect(opened.items[1]?.kind).toBe('column');
  });

  it('draws rules closer the more room a minute has', () => {
    expect([13, 4, 1].map((px) => ruleSteps(px).rule)).toEqual([5, 10, 15]);
  });
});
