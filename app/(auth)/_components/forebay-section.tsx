const staff = Array.from({ length: 41 }, (_, i) => i);
const spokes = Array.from({ length: 12 }, (_, i) => (i * Math.PI) / 6 + 0.2);
const round = (value: number) => Math.round(value * 10) / 10;

/** The forebay in section: a stream that falters, the pool with its staff, the wheel that keeps turning. */
export function ForebaySection() {
  return (
    <svg
      viewBox="-20 130 800 590"
      className="w-full max-w-[800px]"
      role="img"
      aria-label="Section through a forebay: a stream that falters, a pool with a staff gauge, and a pipe that keeps the wheel turning"
    >
      <path d="M150 312V452H500V262H150z" fill="url(#hatch-water)" />
      <path d="M150 352V452H500V352z" fill="var(--water-400)" />
      <path
        d="M-10 214H120L150 250"
        fill="none"
        stroke="var(--water-600)"
        strokeWidth="6"
        strokeDasharray="26 9 14 12 34 16 6 12"
      />
      <path d="M-10 224H112L150 268V452H500V168H528V436" fill="none" stroke="var(--ink)" strokeWidth="2" />
      <path d="M-10 224H112L150 268V452H500V470H132V276L106 242H-10z" fill="url(#hatch-bed)" />
      <path d="M500 168h28v268l-16 -12h-12z" fill="url(#hatch-bed)" />
      <path d="M506 456L574 520V690H770" fill="none" stroke="var(--ink)" strokeWidth="2" />
      <path d="M500 470H506L558 522V706H770V692H574V520L506 456z" fill="url(#hatch-bed)" />
      <path d="M500 424H512L604 511V541L506 452H500z" fill="var(--water-400)" stroke="var(--ink)" strokeWidth="1.5" />
      <path d="M150 262H500" stroke="var(--water-400)" strokeWidth="1.5" strokeDasharray="6 4" />
      <path d="M150 312H500" stroke="var(--water-700)" strokeWidth="2.2" />
      <path d="M262 297h18l-9 14z" fill="var(--paper)" stroke="var(--water-700)" strokeWidth="1.8" />
      <path d="M254 319h34M260 325h22M266 331h10" stroke="var(--water-700)" strokeWidth="1.6" />
      <Staff />
      <Wheel />
      <g fontSize="15" fill="var(--ink)">
        <text x="4" y="180" fontWeight="620">
          the stream falters
        </text>
        <text x="4" y="200" fill="var(--ink-2)">
          late lots, refused lots, stoppages
        </text>
        <text x="184" y="254" fill="var(--ink-2)">
          1 week in 10 stands above this
        </text>
        <text x="296" y="303" fontWeight="620">
          the forebay holds
        </text>
        <text x="184" y="374">
          9 weeks in 10 hold this much
        </text>
        <text x="612" y="462" fontWeight="620">
          the wheel keeps turning
        </text>
        <text x="612" y="482" fill="var(--ink-2)">
          as long as the pool lasts
        </text>
      </g>
    </svg>
  );
}

function Staff() {
  return (
    <g stroke="var(--ink)">
      {staff.map((i) => (
        <path
          key={i}
          d={`M${i % 10 === 0 ? 458 : i % 5 === 0 ? 466 : 474} ${round(452 - i * 6.6)}H484`}
          strokeWidth={i % 10 === 0 ? 2 : 1.2}
        />
      ))}
      <path d="M484 180V452" strokeWidth="2" />
      {[100, 200, 300, 400].map((level) => (
        <text
          key={level}
          x="448"
          y={457 - (level / 100) * 66}
          textAnchor="end"
          fontSize="15"
          fontWeight="560"
          fill="var(--ink)"
          stroke="none"
        >
          {level}
        </text>
      ))}
    </g>
  );
}

function Wheel() {
  const at = (angle: number, radius: number) =>
    `${round(668 + radius * Math.cos(angle))} ${round(596 + radius * Math.sin(angle))}`;
  return (
    <g fill="none" stroke="var(--ink)">
      <circle cx="668" cy="596" r="62" strokeWidth="2.5" />
      <circle cx="668" cy="596" r="12" strokeWidth="2" />
      {spokes.map((angle) => (
        <path
          key={angle}
          d={`M${at(angle, 12)}L${at(angle, 62)}Q${at(angle, 72)} ${at(angle + 0.2, 76)}`}
          strokeWidth="1.6"
        />
      ))}
    </g>
  );
}
