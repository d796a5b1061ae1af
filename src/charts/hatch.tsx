/** Hatch at 45 degrees for keep-out sectors and closed channels. */
export function HatchPattern({ id, gap = 5 }: { id: string; gap?: number }) {
  return (
    <pattern
      id={id}
      width={gap}
      height={gap}
      patternUnits="userSpaceOnUse"
      patternTransform="rotate(45)"
    >
      <line x1="0.45" y1="0" x2="0.45" y2={gap} stroke="var(--hatch)" strokeWidth="0.9" />
    </pattern>
  );
}
