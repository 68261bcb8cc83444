import type { Route } from "next";
import Link from "next/link";
import { Button } from "@/components/ui/button";

type Props = { lineName: string; error: Error | null; retry(): void };

/** In place of a line whose scenario is still being read, or cannot be. */
export function LineAway({ lineName, error, retry }: Props) {
  return (
    <main id="main" className="mx-auto max-w-xl px-5 py-16">
      <h1 className="text-xl font-[620]">{lineName}</h1>
      {error ? (
        <div role="alert" className="mt-4 border-l-[3px] border-silt-600 pl-3">
          <p className="text-m">The scenario could not be read: {error.message}</p>
          <p className="mt-1 text-m text-ink-2">Nothing that was saved is lost.</p>
          <div className="mt-4 flex gap-2">
            <Button onClick={retry}>Try again</Button>
            <Link href={"/lines" as Route} className="self-center text-water-700 underline underline-offset-3">
              All lines
            </Link>
          </div>
        </div>
      ) : (
        <p role="status" className="mt-2 text-m text-ink-2">
          Reading the scenario
        </p>
      )}
    </main>
  );
}
