"use client";

import { type ReactNode, useEffect, useRef, useState } from "react";

type Props = { width: number; height: number; least?: number; label: string; children: ReactNode };

/** Shows something of a fixed size as small as the page needs, down to `least`; below that it scrolls sideways. */
export function ScaleToFit({ width, height, least = 0.5, label, children }: Props) {
  const frame = useRef<HTMLDivElement>(null);
  const [scale, setScale] = useState(1);
  useEffect(() => {
    const element = frame.current;
    if (!element) return;
    const observer = new ResizeObserver(() => setScale(Math.min(1, Math.max(least, element.clientWidth / width))));
    observer.observe(element);
    return () => observer.disconnect();
  }, [width, least]);
  return (
    <div ref={frame} className="overflow-x-auto overflow-y-hidden" role="region" tabIndex={0} aria-label={label}>
      <div style={{ width: width * scale, height: height * scale }}>
        <div className="relative origin-top-left" style={{ width, height, transform: `scale(${scale})` }}>
          {children}
        </div>
      </div>
    </div>
  );
}
