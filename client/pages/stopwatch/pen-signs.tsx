type PenProps = { width: number; path: string };

function Pen({ width, path }: PenProps) {
  return (
    <svg width={width} height="16" viewBox={`0 0 ${width} 16`} fill="none" aria-hidden="true">
      <path d={path} stroke="currentColor" strokeWidth="2" />
    </svg>
  );
}

/** What a recorder's event pen writes when a click is heard. */
export function ClickPen() {
  return <Pen width={34} path="M1 13h14V2v11h18" />;
}

/** The heat pen stepping down. */
export function HeatOffPen() {
  return <Pen width={34} path="M1 3h16v10h16" />;
}

/** Turning back. */
export function UndoPen() {
  return <Pen width={26} path="M8 2 2.5 7.5 8 13M3 7.5h14c9 0 9 7 2 7" />;
}
