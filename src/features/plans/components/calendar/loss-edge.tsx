import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { directionOnAxes, faceAxes } from '../../../../../shared/array/face-geometry.ts';
import { scanLossDb } from '../../../../../shared/array/scan-loss.ts';
import { directionAt } from '../../../../../shared/orbit/track.ts';
import type { Contact } from '../../../../../shared/schemas/plan.ts';
import type { Interval } from '../../../../../shared/time.ts';
import { passQueries } from '../../../../queries/pass-queries.ts';
import { usePlanDesk } from '../../hooks/plan-desk.ts';

const SAMPLES = 14;
const [THIN, THICK] = [2, 7];

interface Props extends Interval {
  contact: Contact;
  color: string;
  /** Widest edge, px; less on low blocks. */
  widest?: number;
}

/** The left edge of a block: scan loss through the contact, 2 px at 0 dB to 7 px at the limit. */
export function LossEdge({ contact, color, fromMs, toMs, widest = THICK }: Props) {
  const { faces, plan } = usePlanDesk();
  const track = useQuery(passQueries.track(contact.passId)).data;
  const face = faces.find(({ id }) => id === contact.faceId);
  const path = useMemo(() => {
    const axes = face && faceAxes(face);
    const widths = Array.from({ length: SAMPLES + 1 }, (_, i) => {
      const ms = fromMs + ((toMs - fromMs) * i) / SAMPLES;
      if (!track || !axes || !face) return THIN;
      const { scanAngleRad } = directionOnAxes(axes, directionAt(track, ms));
      const share = (scanLossDb(face, scanAngleRad) ?? plan.limitOfDayDb) / plan.limitOfDayDb;
      return THIN + Math.max(0, Math.min(1, share)) * (widest - THIN);
    });
    const right = widths.map(
      (width, i) => `${width.toFixed(1)} ${((i * 100) / SAMPLES).toFixed(1)}`,
    );
    return `M0 0L${right.join('L')}L0 100Z`;
  }, [track, face, plan.limitOfDayDb, fromMs, toMs, widest]);
  return (
    <svg
      aria-hidden="true"
      viewBox="0 0 7 100"
      preserveAspectRatio="none"
      className="absolute inset-y-0 left-0 h-full w-[7px]"
    >
      <path d={path} fill={color} />
    </svg>
  );
}
