import { memo } from 'react';
import type { Contact } from '../../../../../shared/schemas/plan.ts';
import { Icon } from '../../../../components/icon.tsx';
import { classNames } from '../../../../lib/class-names.ts';
import { degrees, signed } from '../../../../lib/format-number.ts';
import { clockMinutes, clockSeconds } from '../../../../lib/format-time.ts';
import { isSecondForm, seriesColor } from '../../../../lib/series.ts';
import { usePlanDesk } from '../../hooks/plan-desk.ts';
import { usePlanView } from '../../hooks/plan-view.ts';
import { contactMission, contactName, openContact, type PlanLeg } from '../../model/plan-legs.ts';
import { topOf, useCalendarFrame } from './calendar-frame.ts';
import { LossEdge } from './loss-edge.tsx';

interface Props {
  leg: PlanLeg;
}

const shortSpan = (leg: PlanLeg): string =>
  `:${clockMinutes(leg.fromMs).slice(3)}–:${clockMinutes(leg.toMs).slice(3)}`;

/** One leg of a contact; what it says depends on its height. */
export const ContactBlock = memo(function ContactBlock({ leg }: Props) {
  const { missions, columns, labelOf, logs } = usePlanDesk();
  const { contactId, selectContact } = usePlanView();
  const frame = useCalendarFrame();
  const column = columns.get(leg.channelId);
  const open = openContact(leg.contact);
  const series = missions.series(contactMission(leg.contact));
  const color = series === null ? 'var(--ink-faint)' : seriesColor(series);
  const height = ((leg.toMs - leg.fromMs) / 60_000) * frame.pxPerMinute;
  const selected = contactId === leg.contactId;
  const log = logs.get(leg.contactId);
  const drifted = open?.driftSeconds ?? null;
  const dragged = frame.drag?.leg.id === leg.id;
  const words = wordsOf(leg, labelOf);
  return (
    <button
      type="button"
      data-leg={leg.id}
      aria-pressed={selected}
      aria-label={words}
      title={height < 34 ? words : undefined}
      tabIndex={frame.tabLegId === leg.id ? 0 : -1}
      onClick={() => selectContact(selected ? null : leg.contactId)}
      onPointerDown={(event) => frame.beginDrag(event, leg.id)}
      className={classNames(
        'absolute right-[3px] left-0.5 block touch-none overflow-visible text-left text-caption focus-visible:z-10',
        selected && 'z-10',
        dragged && 'opacity-45',
      )}
      style={{ top: topOf(frame, leg.fromMs), height }}
    >
      <TurnAround
        leg={leg}
        color={color}
        height={height}
        setUp={column?.channel.setUpSeconds ?? 0}
        tearDown={column?.channel.tearDownSeconds ?? 0}
      />
      <span
        aria-hidden="true"
        className="absolute inset-0 overflow-hidden rounded-mark"
        style={{
          background: `color-mix(in srgb, ${color} ${log ? 5 : 15}%, var(--surface))`,
          ...(selected
            ? { boxShadow: '0 0 0 2.5px var(--surface), 0 0 0 4.75px var(--accent)' }
            : {}),
        }}
      >
        {open && leg.direction === 'receive' ? (
          <LossEdge
            contact={open}
            color={color}
            fromMs={leg.fromMs}
            toMs={leg.toMs}
            widest={height < 22 ? 5.5 : 7}
          />
        ) : (
          <span
            className="absolute inset-y-0 left-0 w-1"
            style={
              series !== null && isSecondForm(series)
                ? { borderLeft: `4px dotted ${color}` }
                : { background: color }
            }
          />
        )}
        <BlockWords
          leg={leg}
          open={open}
          height={height}
          partner={labelOf(leg.partnerChannelId)}
          drifted={drifted !== null}
        />
        {drifted !== null && height >= 36 && (
          <span className="figures absolute inset-x-0 bottom-0 flex h-[17px] items-center gap-1 bg-warn-soft pl-2.5 font-semibold text-warn-text">
            <Icon name="drifted" size={12} />
            {signed(drifted, 1)} s
          </span>
        )}
        <Corner
          open={open}
          served={log?.outcome ?? null}
          drifted={drifted !== null}
          height={height}
        />
      </span>
    </button>
  );
});

function BlockWords({
  leg,
  open,
  height,
  partner,
  drifted,
}: {
  leg: PlanLeg;
  open: Contact | null;
  height: number;
  partner: string;
  drifted: boolean;
}) {
  if (height < 12) return null;
  if (leg.direction === 'transmit')
    return (
      <span className="figures absolute inset-x-0 top-0.5 flex items-center gap-1 pl-2.5 font-semibold">
        <Icon name="transmit" size={11} />
        {partner}
      </span>
    );
  const name = <span className="block truncate font-semibold">{contactName(leg.contact)}</span>;
  if (height < 22)
    return <span className="absolute inset-0 flex items-center pr-1 pl-2.5">{name}</span>;
  return (
    <span className="figures absolute inset-x-0 top-1 block pr-1 pl-2.5 leading-[14px]">
      {name}
      {height >= (drifted ? 52 : 34) && (
        <span className="block truncate text-ink-muted">{shortSpan(leg)}</span>
      )}
      {height >= (drifted ? 64 : 48) && open && (
        <span className="block truncate text-ink-muted">max {degrees(open.maxElevationDeg)}</span>
      )}
    </span>
  );
}

/** Lock, emergency and log, at the lower right. */
function Corner({
  open,
  served,
  drifted,
  height,
}: {
  open: Contact | null;
  served: string | null;
  drifted: boolean;
  height: number;
}) {
  if (height < 16) return null;
  const raised = drifted && height >= 36;
  const look = served === 'served' ? 'approve' : served === 'partly' ? 'partly' : 'struck';
  return (
    <span
      className="absolute right-1 flex items-center gap-1 text-ink-muted"
      style={{ bottom: raised ? 19 : 3 }}
    >
      {drifted && !raised && <Icon name="drifted" size={12} className="text-warn-mark" />}
      {open?.emergency && <Icon name="needsAttention" size={12} className="text-danger-mark" />}
      {open?.locked && <Icon name="lock" size={12} />}
      {served && (
        <Icon
          name={look}
          size={13}
          className={
            served === 'served'
              ? 'text-ok-mark'
              : served === 'partly'
                ? 'text-warn-mark'
                : 'text-danger-mark'
          }
        />
      )}
    </span>
  );
}

/** Set-up as a hatched head and tear-down as a foot, both in true length. */
function TurnAround({
  leg,
  color,
  height,
  setUp,
  tearDown,
}: {
  leg: PlanLeg;
  color: string;
  height: number;
  setUp: number;
  tearDown: number;
}) {
  const pxPerMs = height / (leg.toMs - leg.fromMs);
  return (
    <>
      <span
        aria-hidden="true"
        className="absolute inset-x-0"
        style={{
          bottom: '100%',
          height: Math.max(1.5, setUp * 1000 * pxPerMs),
          borderTop: `1px solid ${color}`,
          background: `repeating-linear-gradient(135deg, color-mix(in srgb, ${color} 55%, transparent) 0 1px, transparent 1px 4px)`,
        }}
      />
      <span
        aria-hidden="true"
        className="absolute inset-x-0 opacity-40"
        style={{ top: '100%', height: Math.max(1.5, tearDown * 1000 * pxPerMs), background: color }}
      />
    </>
  );
}

function wordsOf(leg: PlanLeg, labelOf: (id: string | null) => string): string {
  const { contact, direction, channelId, partnerChannelId, fromMs, toMs } = leg;
  const open = openContact(contact);
  const partner = partnerChannelId
    ? `, with ${direction === 'receive' ? 'uplink' : 'receive leg'} on ${labelOf(partnerChannelId)}`
    : '';
  const more = open
    ? `, highest ${degrees(open.maxElevationDeg)}${open.locked ? ', locked' : ''}${open.driftSeconds === null ? '' : `, drifted ${signed(open.driftSeconds, 1)} s`}`
    : '';
  return `${contactName(contact)}, ${direction} on ${labelOf(channelId)}, ${clockSeconds(fromMs)} to ${clockSeconds(toMs)} UTC${partner}${more}`;
}
