/** The hatches of all marks, once a page: each meaning has a pattern, so that the sheet reads in grey. */
export function HatchDefs() {
  return (
    <svg width="0" height="0" className="absolute" aria-hidden>
      <defs>
        <pattern id="hatch-short" width="5" height="5" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
          <rect width="5" height="5" fill="var(--silt-100)" />
          <path d="M1 0v5" stroke="var(--silt-600)" strokeWidth="1.9" />
        </pattern>
        <pattern id="hatch-water" width="6" height="4" patternUnits="userSpaceOnUse">
          <rect width="6" height="4" fill="var(--water-100)" />
          <path d="M0 2h6" stroke="var(--water-400)" strokeWidth="1" />
        </pattern>
        <pattern id="hatch-room" width="4" height="4" patternUnits="userSpaceOnUse">
          <rect width="4" height="4" fill="var(--water-200)" />
          <path d="M0 1h4" stroke="var(--water-600)" strokeWidth="1.4" />
        </pattern>
        <pattern id="hatch-stop" width="4" height="4" patternUnits="userSpaceOnUse">
          <rect width="4" height="4" fill="var(--sheet)" />
          <path d="M2 0v4" stroke="var(--ink-2)" strokeWidth="1.2" />
        </pattern>
        <pattern id="hatch-order" width="6" height="6" patternUnits="userSpaceOnUse">
          <circle cx="1.5" cy="1.5" r=".8" fill="var(--water-600)" />
          <circle cx="4.5" cy="4.5" r=".8" fill="var(--water-600)" />
        </pattern>
        <pattern id="hatch-bed" width="5" height="5" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
          <path d="M1 0v5" stroke="var(--ink-3)" strokeWidth="1" />
        </pattern>
      </defs>
    </svg>
  );
}

export const hatch = {
  short: "url(#hatch-short)",
  water: "url(#hatch-water)",
  room: "url(#hatch-room)",
  stop: "url(#hatch-stop)",
  order: "url(#hatch-order)",
  bed: "url(#hatch-bed)",
} as const;
