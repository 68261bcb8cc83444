/** The mark of a water level in section: the sign of the house. */
export function WaterMark({ size = 22 }: { size?: number }) {
  return (
    <svg width={size} height={size} viewBox="0 0 22 22" aria-hidden className="shrink-0 text-water-600">
      <path d="M4 3.5h14l-7 8z" fill="none" stroke="currentColor" strokeWidth="1.9" />
      <path d="M1.5 13.2h19M5 16.6h12M8.3 20h5.4" stroke="currentColor" strokeWidth="1.9" />
    </svg>
  );
}
