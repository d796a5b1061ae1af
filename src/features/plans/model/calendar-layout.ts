import { overlaps, type Interval } from '../../../../shared/time.ts';
import type { ColumnGroup, PlanColumn } from './columns.ts';

/** One column of the calendar as it stands on screen, px from the left edge of the first column. */
export interface CalendarItem {
  id: string;
  /** A rail folds columns that hold nothing in the stretch, or are closed all through it. */
  kind: 'column' | 'rail';
  columns: PlanColumn[];
  groupKey: string;
  label: string;
  /** Why a rail is one. */
  words: string;
  isClosed: boolean;
  x: number;
  width: number;
}
export interface GroupSpan {
  group: ColumnGroup;
  x: number;
  width: number;
}
export interface CalendarLayout {
  items: CalendarItem[];
  groups: GroupSpan[];
  width: number;
}

const RAIL = 26;
const GROUP_GAP = 14;
const LEAST = { receive: 72, transmit: 54 };
const SHARE = { receive: 1, transmit: 0.74 };

interface Question {
  groups: readonly ColumnGroup[];
  stretch: Interval;
  /** Channels that hold a leg or an open pass in the stretch. */
  occupied: ReadonlySet<string>;
  /** Rails that were opened by hand, by the id of their first channel. */
  unfolded: ReadonlySet<string>;
  width: number;
  closedWords: (column: PlanColumn) => string;
}

type Draft = Omit<CalendarItem, 'x' | 'width'> & { direction: 'receive' | 'transmit' };

/** Columns side by side; what is empty folds only when the rest would become too narrow. */
export function layoutCalendar(question: Question): CalendarLayout {
  const roomy = draftItems(question, false);
  const needed = leastWidth(roomy, question.groups.length);
  const items = needed <= question.width ? roomy : draftItems(question, true);
  return place(items, question);
}

function draftItems(question: Question, foldEmpty: boolean): Draft[] {
  const { groups, stretch, occupied, unfolded, closedWords } = question;
  return groups.flatMap((group) => {
    const items: Draft[] = [];
    for (const column of group.columns) {
      const common = { groupKey: group.key, direction: group.direction };
      const isClosed = column.closed.some(
        ({ fromMs, toMs }) => fromMs <= stretch.fromMs && toMs >= stretch.toMs,
      );
      const holdsNothing = !occupied.has(column.id);
      const folds = holdsNothing && (isClosed || foldEmpty);
      const last = items.at(-1);
      if (!folds || unfolded.has(column.id)) {
        items.push({
          ...common,
          id: column.id,
          kind: 'column',
          columns: [column],
          label: column.channel.label,
          words: '',
          isClosed,
        });
      } else if (!isClosed && last?.kind === 'rail' && !last.isClosed) {
        last.columns.push(column);
        last.label = railLabel(last.columns);
        last.words = `${last.columns[0]?.channel.label ?? ''} to ${column.channel.label} hold nothing in these hours`;
      } else {
        const words = isClosed
          ? closedWords(column)
          : `${column.channel.label} holds nothing in these hours`;
        items.push({
          ...common,
          id: column.id,
          kind: 'rail',
          columns: [column],
          label: column.channel.label,
          words,
          isClosed,
        });
      }
    }
    return items;
  });
}

const railLabel = (columns: readonly PlanColumn[]): string => {
  const figures = (column: PlanColumn | undefined): string =>
    column?.channel.label.replace(/^\D+/, '') ?? '';
  return `${figures(columns[0])}–${figures(columns.at(-1))}`;
};

const leastWidth = (items: readonly Draft[], groups: number): number =>
  items.reduce((sum, item) => sum + (item.kind === 'rail' ? RAIL : LEAST[item.direction]), 0) +
  GROUP_GAP * Math.max(0, groups - 1);

function place(items: readonly Draft[], { groups, width }: Question): CalendarLayout {
  const gaps = GROUP_GAP * Math.max(0, groups.length - 1);
  const rails = items.filter(({ kind }) => kind === 'rail').length * RAIL;
  const shares = items.reduce(
    (sum, item) => sum + (item.kind === 'rail' ? 0 : SHARE[item.direction]),
    0,
  );
  const total = Math.max(width, leastWidth(items, groups.length));
  const unit = shares === 0 ? 0 : (total - gaps - rails) / shares;
  const placed: CalendarItem[] = [];
  const spans: GroupSpan[] = [];
  let x = 0;
  for (const group of groups) {
    if (spans.length > 0) x += GROUP_GAP;
    const from = x;
    for (const { direction, ...item } of items.filter(({ groupKey }) => groupKey === group.key)) {
      const itemWidth = item.kind === 'rail' ? RAIL : unit * SHARE[direction];
      placed.push({ ...item, x, width: itemWidth });
      x += itemWidth;
    }
    spans.push({ group, x: from, width: x - from });
  }
  return { items: placed, groups: spans, width: x };
}

/** Minutes between the rules of the calendar, and between those that carry a time. */
export function ruleSteps(pxPerMinute: number): { rule: number; label: number } {
  if (pxPerMinute >= 6) return { rule: 5, label: 5 };
  if (pxPerMinute >= 2.5) return { rule: 10, label: 10 };
  return { rule: 15, label: 30 };
}

export const touches = (interval: Interval, stretch: Interval): boolean =>
  overlaps(interval, stretch);
