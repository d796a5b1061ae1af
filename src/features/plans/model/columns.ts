import type { Channel, Closure } from '../../../../shared/schemas/channel.ts';
import type { Face } from '../../../../shared/schemas/face.ts';
import type { Interval } from '../../../../shared/time.ts';
import { closedSpans, type ClosedSpan } from '../../../lib/closures.ts';
import { polarisationWord } from '../../../lib/polarisation.ts';

/** One beam channel as a column of the plan, with what closes it on the day. */
export interface PlanColumn {
  id: string;
  channel: Channel;
  face: Face;
  closed: ClosedSpan[];
}
/** Columns of one direction and sense stand together under one head. */
export interface ColumnGroup {
  key: string;
  title: string;
  direction: 'receive' | 'transmit';
  columns: PlanColumn[];
}

const byLabel = (a: { channel: Channel }, b: { channel: Channel }): number =>
  a.channel.label.localeCompare(b.channel.label, 'en', { numeric: true });

const titleOf = (channel: Channel, face: Face, severalFaces: boolean): string => {
  const word = channel.direction === 'receive' ? 'Receive' : 'Transmit';
  const sense =
    channel.direction === 'receive' ? `, ${polarisationWord(channel.polarisation)}` : '';
  return `${severalFaces ? `${face.label}, ${word.toLowerCase()}` : word}${sense}`;
};

/** All channels of a station as columns, grouped: receive by sense, then transmit, face by face. */
export function columnGroups(
  {
    channels,
    faces,
    closures,
  }: { channels: readonly Channel[]; faces: readonly Face[]; closures: readonly Closure[] },
  span: Interval,
): ColumnGroup[] {
  const groups = new Map<string, ColumnGroup>();
  const order = ['rhcp', 'lhcp', 'linear', 'both'];
  const sorted = channels
    .flatMap((channel) => {
      const face = faces.find(({ id }) => id === channel.faceId);
      return face && channel.inService ? [{ channel, face }] : [];
    })
    .sort(
      (a, b) =>
        a.face.label.localeCompare(b.face.label) ||
        a.channel.direction.localeCompare(b.channel.direction) ||
        order.indexOf(a.channel.polarisation) - order.indexOf(b.channel.polarisation) ||
        byLabel(a, b),
    );
  for (const { channel, face } of sorted) {
    const title = titleOf(channel, face, faces.length > 1);
    const group = groups.get(title) ?? {
      key: title,
      title,
      direction: channel.direction,
      columns: [],
    };
    groups.set(title, group);
    group.columns.push({
      id: channel.id,
      channel,
      face,
      closed: closedSpans(channel, closures, span),
    });
  }
  return [...groups.values()];
}
