import Link from "next/link";
import type { ReactNode } from "react";
import { WaterMark } from "./water-mark";

/** A page that only says one thing: what is the matter, and where to go from here. */
export function PlainPage({ title, children, action }: { title: string; children?: ReactNode; action?: ReactNode }) {
  return (
    <main id="main" className="mx-auto max-w-[560px] px-5 py-16 sm:py-24">
      <p className="flex items-center gap-2.5 font-[680]">
        <WaterMark />
        Forebay
      </p>
      <h1 className="mt-8 border-t border-ink pt-5 text-2xl font-title tracking-[-.015em]">{title}</h1>
      {children && <div className="mt-2 text-l text-ink-2">{children}</div>}
      <p className="mt-6">{action ?? <Link href="/lines">To your lines</Link>}</p>
    </main>
  );
}
