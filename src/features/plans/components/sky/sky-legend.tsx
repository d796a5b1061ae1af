/** What the marks of the sheet mean, at its feet. */
export function SkyLegend() {
  return (
    <>
      <ul className="pointer-events-none absolute bottom-3 left-5 hidden text-caption narrow:block">
        <Row words="half-power beam">
          <ellipse
            cx="11"
            cy="8"
            rx="9"
            ry="6"
            fill="var(--series-2)"
            fillOpacity="0.2"
            stroke="var(--series-2)"
            strokeWidth="1.6"
          />
        </Row>
        <Row words="contact, minute ticks">
          <path d="M1 8H21M7 5.5v5M15 5.5v5" stroke="var(--series-2)" strokeWidth="1.8" />
        </Row>
        <Row words="pass outside a contact">
          <path
            d="M1 8H21"
            stroke="var(--ink-faint)"
            strokeWidth="1.4"
            strokeDasharray="0.1 4"
            strokeLinecap="round"
          />
        </Row>
      </ul>
      <ul className="pointer-events-none absolute right-5 bottom-3 hidden text-caption narrow:block">
        <Row words="below the horizon mask">
          <rect x="1" y="2" width="20" height="12" fill="var(--land)" stroke="var(--line-strong)" />
        </Row>
        <Row words="scan loss over the limit">
          <rect
            x="1"
            y="2"
            width="20"
            height="12"
            fill="var(--shade)"
            stroke="var(--line-strong)"
          />
        </Row>
      </ul>
    </>
  );
}

function Row({ words, children }: { words: string; children: React.ReactNode }) {
  return (
    <li className="flex items-center gap-2 py-0.5 text-ink-muted">
      <svg width="22" height="16" aria-hidden="true">
        {children}
      </svg>
      {words}
    </li>
  );
}
