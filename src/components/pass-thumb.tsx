import { useQuery } from '@tanstack/react-query';
import { useEffect, useMemo, useRef, useState } from 'react';
import type { Interval } from '../../shared/time.ts';
import { SkyThumb } from '../charts/sky-thumb.tsx';
import type { SkyGround } from '../charts/sky-ground.ts';
import { passQueries } from '../queries/pass-queries.ts';
import { isSecondForm, seriesColor } from '../lib/series.ts';

interface Props extends Interval {
  ground: SkyGround | null;
  passId: string;
  series: number | null;
  contacts?: readonly Interval[];
  size: number;
  label?: string;
}

const NONE: readonly Interval[] = [];

/** Thumbnail of one pass; its track is fetched when the row comes near the window. */
export function PassThumb({ ground, passId, size, label, ...rest }: Props) {
  const [element, near] = useNearWindow();
  const track = useQuery({ ...passQueries.track(passId), enabled: near });
  const { fromMs, toMs, series, contacts = NONE } = rest;
  const tracks = useMemo(
    () =>
      track.data
        ? [
            {
              id: passId,
              fromMs,
              toMs,
              contacts,
              track: track.data,
              color: series === null ? null : seriesColor(series),
              dashed: series !== null && isSecondForm(series),
            },
          ]
        : [],
    [track.data, passId, fromMs, toMs, contacts, series],
  );
  return (
    <span ref={element} className="inline-block shrink-0" style={{ width: size, height: size }}>
      {ground && near && (
        <SkyThumb ground={ground} size={size} tracks={tracks} {...(label ? { label } : {})} />
      )}
    </span>
  );
}

function useNearWindow(): [React.RefObject<HTMLSpanElement | null>, boolean] {
  const ref = useRef<HTMLSpanElement>(null);
  const [near, setNear] = useState(false);
  useEffect(() => {
    const element = ref.current;
    if (!element || near) return undefined;
    const observer = new IntersectionObserver(
      (entries) => entries.some((entry) => entry.isIntersecting) && setNear(true),
      { rootMargin: '120px' },
    );
    observer.observe(element);
    return () => observer.disconnect();
  }, [near]);
  return [ref, near];
}
