import type { ReactNode } from "react";
import { Masthead } from "./masthead";

type Props = { workspaceName: string; userName: string; current: "lines" | "account"; children: ReactNode };

/** The frame of the pages around the lines: masthead and a sheet of readable width. */
export function OuterPage({ workspaceName, userName, current, children }: Props) {
  return (
    <>
      <Masthead
        where={[{ label: workspaceName }]}
        userName={userName}
        views={[{ label: "Lines", href: "/lines", isCurrent: current === "lines" }]}
      />
      <main id="main" className="mx-auto w-full max-w-[1192px] px-4 pt-7 pb-16 sm:px-5 sm:pt-9">
        {children}
      </main>
    </>
  );
}
