import type { Route } from "next";
import Link from "next/link";

export type View = { label: string; href: string; isCurrent: boolean; count?: number };

/** The views of what one is looking at; the current one stands in water on the masthead's rule. */
export function Views({ views }: { views: readonly View[] }) {
  return (
    <nav aria-label="Views" className="flex items-stretch overflow-x-auto">
      {views.map(({ label, href, isCurrent, count }) => (
        <Link
          key={label}
          href={href as Route}
          aria-current={isCurrent ? "page" : undefined}
          className="relative flex min-h-11 items-center px-2.5 whitespace-nowrap text-ink-2 no-underline hover:bg-water-50 hover:text-ink focus-visible:shadow-[inset_0_0_0_2px_var(--water-600)] aria-[current]:font-[640] aria-[current]:text-ink aria-[current]:after:absolute aria-[current]:after:inset-x-[9px] aria-[current]:after:bottom-0 aria-[current]:after:h-1 aria-[current]:after:bg-water-600 min-[1380px]:px-[13px]"
        >
          {label}
          {count !== undefined && <span className="ml-[5px] text-s font-text text-ink-3">{count}</span>}
        </Link>
      ))}
    </nav>
  );
}
