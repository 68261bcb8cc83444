import { labelled } from "./chart-labels";

type ShareGridProps = { from: number; y(share: number): number; left: number; right: number };

/** Lines across at round shares, with their per cent at the left. */
export function ShareGrid({ from, y, left, right }: ShareGridProps) {
  const step = 1 - from > 0.5 ? 0.2 : 1 - from > 0.2 ? 0.1 : 0.05;
  const shares = Array.from({ length: 30 }, (_, i) => 1 - i * step).filter((share) => share >= from - 1e-9);
  return shares.map((share) => (
    <g key={share}>
      <path d={`M${left} ${y(share)}H${right}`} stroke="var(--rule)" />
      <text x={left - 6} y={y(share) + 4} textAnchor="end" className="axis-text">
        {Math.round(share * 100)}
      </text>
    </g>
  ));
}

type ValueAxisProps = {
  values: readonly number[];
  x(value: number): number;
  y: number;
  left: number;
  right: number;
  showValue(value: number): string;
};

/** A tick at each value along the foot; those names are left out that have no room. */
export function ValueAxis({ values, x, y, left, right, showValue }: ValueAxisProps) {
  const named = labelled(values.map((value) => ({ at: x(value), width: 10 + showValue(value).length * 7 })));
  return (
    <>
      <path d={`M${left} ${y}H${right}`} stroke="var(--ink)" strokeWidth="1.5" />
      {values.map((value, i) => (
        <g key={value}>
          <path d={`M${x(value)} ${y}v6`} stroke="var(--ink)" />
          {named.has(i) && (
            <text x={x(value)} y={y + 21} textAnchor="middle" className="axis-text">
              {showValue(value)}
            </text>
          )}
        </g>
      ))}
    </>
  );
}
