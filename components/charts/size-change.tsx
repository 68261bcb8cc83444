const width = 150;
const most = 0.4;

/** Change of one size against today on a staff from -40 % to +40 %; arrows where it goes beyond. */
export function SizeChange({ today, found, textbook }: { today: number; found: number; textbook: number | null }) {
  const x = (size: number) => {
    const change = Math.min(most, Math.max(-most, size / today - 1));
    return width / 2 + (change / most) * (width / 2 - 6);
  };
  const isBeyond = Math.abs(found / today - 1) > most;
  const at = x(found);
  return (
    <svg width={width} height="24" aria-hidden>
      <path d={`M6 16H${width - 6}`} stroke="var(--rule)" />
      {[-4, -3, -2, -1, 1, 2, 3, 4].map((i) => (
        <path key={i} d={`M${width / 2 + (i / 4) * (width / 2 - 6)} 16v3`} stroke="var(--rule-2)" />
      ))}
      <path d={`M${width / 2} 4v16`} stroke="var(--ink)" strokeWidth="1.5" />
      <path d={`M${width / 2} 13H${at}`} stroke="var(--water-600)" strokeWidth="3" />
      {isBeyond ? (
        <path d={found > today ? `M${at - 2} 7l8 5-8 5z` : `M${at + 2} 7l-8 5 8 5z`} fill="var(--ink)" />
      ) : (
        <path d={`M${at - 5} 6h10l-5 8z`} fill="var(--ink)" />
      )}
      {textbook !== null && (
        <path d={`M${x(textbook) - 3.5} 16.5l7 7m0-7l-7 7`} stroke="var(--ink-2)" strokeWidth="1.5" />
      )}
    </svg>
  );
}
