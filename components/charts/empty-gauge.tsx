/** A staff gauge with no water in it. */
export function EmptyGauge({ height = 64 }: { height?: number }) {
  const ticks = Array.from({ length: 11 }, (_, i) => i);
  return (
    <svg width="36" height={height + 6} aria-hidden className="shrink-0">
      {ticks.map((i) => (
        <path
          key={i}
          d={`M${12 - (i % 5 === 0 ? 11 : 5)} ${2 + (i * height) / 10}H12`}
          stroke="var(--ink-2)"
          strokeWidth={i % 5 === 0 ? 1.3 : 0.9}
        />
      ))}
      <path d={`M12 0V${height + 2}H34V0`} fill="none" stroke="var(--ink)" strokeWidth="1.5" />
    </svg>
  );
}
