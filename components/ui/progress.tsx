/** Ruled water rising along a trough; `share` is 0 to 1. */
export function Progress({ share, label }: { share: number; label: string }) {
  const percent = Math.min(100, Math.max(0, share * 100));
  return (
    <div
      role="progressbar"
      aria-label={label}
      aria-valuemin={0}
      aria-valuemax={100}
      aria-valuenow={Math.round(percent)}
      className="h-2.5 border border-rule-2 bg-sunk"
    >
      <svg width="100%" height="100%" aria-hidden>
        <rect width={`${percent}%`} height="100%" fill="url(#hatch-room)" />
        <rect x={`${percent}%`} width="2" height="100%" fill="var(--water-700)" transform="translate(-2)" />
      </svg>
    </div>
  );
}
