import type { SVGProps } from "react";

type IconProps = SVGProps<SVGSVGElement>;
const common = { "aria-hidden": true, fill: "none", stroke: "currentColor", className: "shrink-0" } as const;

export const ChevronIcon = (props: IconProps) => (
  <svg width="10" height="6" viewBox="0 0 10 6" strokeWidth="1.5" {...common} {...props}>
    <path d="M1 1l4 4 4-4" />
  </svg>
);
export const CrossIcon = (props: IconProps) => (
  <svg width="12" height="12" viewBox="0 0 12 12" strokeWidth="1.5" {...common} {...props}>
    <path d="M1.5 1.5l9 9m0-9l-9 9" />
  </svg>
);
export const WarnIcon = (props: IconProps) => (
  <svg width="15" height="14" viewBox="0 0 15 14" strokeWidth="1.4" {...common} {...props}>
    <path d="M7.5 1.2L14 12.8H1zM7.5 5v4M7.5 10.2v1.4" />
  </svg>
);
export const TickIcon = (props: IconProps) => (
  <svg width="13" height="11" viewBox="0 0 13 11" strokeWidth="1.8" {...common} {...props}>
    <path d="M1 5.5l3.8 4L12 1" />
  </svg>
);
export const DotsIcon = (props: IconProps) => (
  <svg width="16" height="4" viewBox="0 0 16 4" {...common} fill="currentColor" stroke="none" {...props}>
    <circle cx="2" cy="2" r="1.5" />
    <circle cx="8" cy="2" r="1.5" />
    <circle cx="14" cy="2" r="1.5" />
  </svg>
);
