const OUTER = 'M0 0C-2.1-5.4-2.1-10.6 0-16.6 2.1-10.6 2.1-5.4 0 0Z';
const MIDDLE = 'M0 0C-2.6-6-2.6-12 0-18.2 2.6-12 2.6-6 0 0Z';

/** Three beams that fan from one point above a short bar, the array face. */
export function Mark({ size = 26 }: { size?: number }) {
  return (
    <svg width={size} height={size} viewBox="0 0 24 24" aria-hidden="true" className="shrink-0">
      <g transform="translate(12 20)" fill="var(--ink)">
        <path d={OUTER} transform="rotate(-40)" />
        <path d={MIDDLE} fill="var(--accent)" />
        <path d={OUTER} transform="rotate(40)" />
      </g>
      <path d="M5.5 22.4h13" stroke="var(--ink)" strokeWidth="1.8" strokeLinecap="round" />
    </svg>
  );
}

export function WordMark({ size = 18 }: { size?: number }) {
  const large = size > 24;
  return (
    <span className="inline-flex items-center" style={{ gap: large ? 12 : 8 }}>
      <Mark size={large ? 44 : 26} />
      <span
        className="font-semibold text-ink"
        style={{
          fontSize: `${size / 16}rem`,
          lineHeight: 1.15,
          letterSpacing: large ? '-0.03em' : '-0.02em',
        }}
      >
        Skysheaf
      </span>
    </span>
  );
}
