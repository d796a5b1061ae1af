import { faceAxes } from '../../../shared/array/face-geometry.ts';
import { scanLossDb } from '../../../shared/array/scan-loss.ts';
import { directionAt } from '../../../shared/orbit/track.ts';
import type { PlanContext } from '../../../shared/schedule/context.ts';
import { servicesOf } from '../../../shared/schedule/services.ts';
import type { ContactModel, FaceModel, PassModel } from '../../../shared/schedule/model.ts';
import { SECOND_MS, type Interval } from '../../../shared/time.ts';
import { dot } from '../../../shared/vector.ts';

/**
 * What a contact is worth, in weighted seconds. Fixed and documented, no knobs: a second of downlink counts the weight
 * of its mission, a second of wanted uplink a quarter of it; an unchanged contact is worth two weighted seconds more
 * (less than any minute, more than any difference in quality); quality decides between equals.
 */
const UPLINK_SHARE = 0.25;
export const UNCHANGED_BONUS = 2;
const QUALITY_SHARE = 0.001;
const SAMPLE_MS = 15 * SECOND_MS;

/** Weight of a mission: priority 1 counts five times as much as priority 5. */
export const missionWeight = (priority: number): number => Math.min(5, Math.max(1, 6 - priority));

/** Seconds of a leg, each counted by the amplitude left after scan loss (1 at boresight). */
function qualitySeconds(face: FaceModel, pass: PassModel, span: Interval): number {
  const { normal } = faceAxes(face);
  const count = Math.max(1, Math.round((span.toMs - span.fromMs) / SAMPLE_MS));
  const stepMs = (span.toMs - span.fromMs) / count;
  let sum = 0;
  for (let index = 0; index < count; index++) {
    const s = directionAt(pass.track, span.fromMs + (index + 0.5) * stepMs);
    const lossDb = scanLossDb(face, Math.acos(Math.min(1, dot(s, normal))));
    sum += lossDb === null ? 0 : 10 ** (-lossDb / 20);
  }
  return (sum * stepMs) / SECOND_MS;
}

export interface WorthQuestion {
  pass: PassModel;
  faceId: string;
  receive: Interval;
  transmit: Interval | null;
  uplinkWanted: boolean;
  unchanged: boolean;
}

const seconds = (span: Interval | null): number =>
  span ? (span.toMs - span.fromMs) / SECOND_MS : 0;

/** Worth of a contact, weighted seconds. */
export function worthOf(context: PlanContext, question: WorthQuestion): number {
  const { pass, receive, transmit } = question;
  const weight = missionWeight(context.missions.get(pass.missionId)?.priority ?? 5);
  const face = context.faces.get(question.faceId);
  const uplink = question.uplinkWanted ? UPLINK_SHARE * seconds(transmit) : 0;
  const quality = face ? QUALITY_SHARE * qualitySeconds(face, pass, receive) : 0;
  const bonus = question.unchanged ? UNCHANGED_BONUS : 0;
  return weight * (seconds(receive) + uplink + quality) + bonus;
}

/** Worth of a contact. */
export function contactWorth(
  context: PlanContext,
  contact: Omit<ContactModel, 'id'>,
  unchanged: boolean,
): number {
  const pass = context.passes.get(contact.passId);
  if (!pass) return 0;
  const uplinkWanted = servicesOf(context.day, pass).some(({ uplink }) => uplink !== 'none');
  return worthOf(context, { ...contact, pass, uplinkWanted, unchanged });
}
