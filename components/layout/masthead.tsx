import type { Route } from "next";
import Link from "next/link";
import type { ReactNode } from "react";
import { AvatarMenu } from "./avatar-menu";
import { type View, Views } from "./views";
import { WaterMark } from "./water-mark";

type Props = {
  /** From the workspace to the thing one is looking at. */
  where: readonly { label: string; href?: string }[];
  views: readonly View[];
  userName: string;
  end?: ReactNode;
};

/** Mark, place, views, and what concerns the whole page. On a phone the views stand on a line of their own. */
export function Masthead({ where, views, userName, end }: Props) {
  return (
    <header className="relative z-10 flex shrink-0 flex-wrap items-stretch border-b border-ink bg-paper pr-3 pl-3 sm:pr-5 sm:pl-[18px] print:hidden">
      <a href="#main" className="absolute -top-12 left-3 z-20 bg-ink px-3 py-2 text-on-ink focus:top-1">
        To the content
      </a>
      <Link
        href={"/lines" as Route}
        className="flex min-h-[51px] items-center gap-[9px] pr-3 text-[17px] font-[680] tracking-[-.01em] text-ink no-underline sm:pr-[18px]"
      >
        <WaterMark />
        <span className="max-sm:sr-only">Forebay</span>
      </Link>
      <div className="flex min-w-0 flex-1 items-center gap-2 overflow-hidden border-l border-rule px-3 sm:flex-none sm:px-[18px]">
        {where.map(({ label, href }, i) => (
          <span
            key={label}
            className={i < where.length - 1 ? "flex min-w-0 shrink items-center gap-2 max-md:hidden" : "min-w-0"}
          >
            {href ? (
              <Link href={href as Route} className="block max-w-48 truncate text-ink-2 no-underline hover:text-ink">
                {label}
              </Link>
            ) : (
              <b className="block max-w-64 truncate font-[620]" title={label}>
                {label}
              </b>
            )}
            {i < where.length - 1 && (
              <span aria-hidden className="text-ink-3">
                /
              </span>
            )}
          </span>
        ))}
      </div>
      <div className="order-last -mx-3 flex w-[calc(100%+24px)] border-t border-rule px-1 sm:order-none sm:mx-0 sm:w-auto sm:border-t-0 sm:border-l sm:px-2">
        <Views views={views} />
      </div>
      <div className="ml-auto flex items-center gap-3 pl-3">
        {end}
        <AvatarMenu userName={userName} />
      </div>
    </header>
  );
}
