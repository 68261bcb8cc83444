"use client";

import { Popover } from "radix-ui";
import { useLine } from "@/lib/client/line-state";
import type { Caution } from "@/lib/line/cautions";
import type { Fault } from "@/lib/line/types";
import { describeAbout, idsOf } from "./fault-text";

type Item = { text: string; ids: string[] };

/** "Checked: no faults, 1 caution", with the list behind it; an item selects what it is about. */
export function Checks() {
  const { document, faults, cautions, select } = useLine();
  const nothing = faults.length + cautions.length === 0;
  const text = `Checked: ${count(faults.length, "fault")}, ${count(cautions.length, "caution")}`;
  if (nothing) return <span className="text-s whitespace-nowrap text-ink-3">{text}</span>;
  const toItem = (about: Fault | Caution): Item => ({ text: describeAbout(about, document), ids: idsOf(about) });
  return (
    <Popover.Root>
      <Popover.Trigger
        className={`min-h-[26px] text-s whitespace-nowrap underline decoration-rule-2 underline-offset-3 hover:decoration-2 ${
          faults.length > 0 ? "text-silt-700" : "text-ink-2"
        }`}
      >
        {text}
      </Popover.Trigger>
      <Popover.Portal>
        <Popover.Content
          align="end"
          sideOffset={8}
          collisionPadding={8}
          aria-label="Faults and cautions"
          className="z-40 max-h-[60dvh] w-96 max-w-[calc(100vw-16px)] overflow-auto border-[1.5px] border-ink bg-sheet p-4 shadow-dialog"
        >
          <List
            title="Faults: the line cannot run before they are put right"
            items={faults.map(toItem)}
            isFault
            onPick={select}
          />
          <List title="Cautions: it runs, but look at these" items={cautions.map(toItem)} onPick={select} />
        </Popover.Content>
      </Popover.Portal>
    </Popover.Root>
  );
}

type ListProps = { title: string; items: Item[]; isFault?: boolean; onPick(ids: string[]): void };

function List({ title, items, isFault = false, onPick }: ListProps) {
  if (items.length === 0) return null;
  return (
    <section className="not-first:mt-4">
      <h3 className="mb-1 border-b border-ink pb-1 text-s font-semibold">{title}</h3>
      <ul>
        {items.map(({ text, ids }, i) => (
          <li key={i} className="border-b border-rule last:border-b-0">
            {ids.length > 0 ? (
              <Popover.Close
                className={`w-full py-1.5 text-left text-m hover:bg-water-50 ${isFault ? "text-silt-700" : ""}`}
                onClick={() => onPick(ids)}
              >
                {text}
              </Popover.Close>
            ) : (
              <p className={`py-1.5 text-m ${isFault ? "text-silt-700" : ""}`}>{text}</p>
            )}
          </li>
        ))}
      </ul>
    </section>
  );
}

function count(n: number, word: string): string {
  return `${n === 0 ? "no" : n} ${n === 1 ? word : `${word}s`}`;
}
