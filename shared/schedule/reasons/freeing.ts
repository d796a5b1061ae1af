import { MINUTE_MS } from '../../time.ts';
import { channelLabel, type PlanContext } from '../context.ts';
import type { ContactModel } from '../model.ts';
import { clockSpan } from '../words.ts';
import { assignEdit, type PlanEdit } from './plan-edits.ts';

/** A single change that would let a pass onto the plan, tried out: with it every rule holds. */
export interface Freeing {
  kind:
    | 'assign'
    | 'move'
    | 'trim'
    | 'drop'
    | 'channel'
    | 'transmit-beam'
    | 'limit-of-day'
    | 'closure'
    | 'separation';
  words: string;
  /** Contact minutes that others lose by it. */
  costMinutes: number;
  /** Edits that do it on this plan; empty where something else must be changed first. */
  edits: PlanEdit[];
}

export const minutesOf = ({ receive }: ContactModel): number =>
  (receive.toMs - receive.fromMs) / MINUTE_MS;

/** `on R3 from 06:10:02 to 06:18:40`. */
export const placeWords = (context: PlanContext, { receive, transmit }: ContactModel): string =>
  `on ${channelLabel(context, receive.channelId)}${transmit ? ` and ${channelLabel(context, transmit.channelId)}` : ''} from ${clockSpan(receive)}`;

export const assigning = (placed: ContactModel): PlanEdit[] => [assignEdit(placed)];
