type Props = { x: number; from: number; to: number; y: number; isLive?: boolean };

/** A capped 95 % interval with its reading: a diamond when settled, a ring while live. Place in px. */
export function Whisker({ x, from, to, y, isLive = false }: Props) {
  const stroke = isLive ? "var(--water-600)" : "var(--ink)";
  return (
    <g stroke={stroke} strokeWidth="1.5" fill="none">
      <path d={`M${from} ${y - 4}v8M${to} ${y - 4}v8M${from} ${y}H${to}`} />
      {isLive ? (
        <circle cx={x} cy={y} r="3.5" fill="var(--sheet)" strokeWidth="1.8" />
      ) : (
        <path d={`M${x - 4} ${y}l4-4 4 4-4 4z`} fill="var(--ink)" stroke="none" />
      )}
    </g>
  );
}
