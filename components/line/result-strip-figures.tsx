"use client";

import { ReadingRuler } from "@/components/charts/reading-ruler";
import { useLine } from "@/lib/client/line-state";
import { formatMoney, formatNumber, percentileName, withSign } from "@/lib/format";
import type { Figure } from "@/lib/simulation/types";
import type { StripFigures, StripReading } from "./strip-reading";

const cell = "hidden overflow-hidden border-l border-rule px-3 pt-[11px] pb-2.5 lg:block min-[86.25rem]:px-4";

/** The ruler, capital tied up and cost a year: of the settled reading, with what the edit would change. */
export function ResultStripFigures({ reading: { settled, live, edited } }: { reading: StripReading }) {
  const { document } = useLine();
  const figures = settled ?? live;
  const money = { isLive: !settled, currency: document.money.currency };
  return (
    <>
      <div className={cell}>
        {figures ? (
          <Ruler figures={figures} edited={edited?.atRisk ?? null} isLive={!settled} />
        ) : (
          <Missing label="Weekly fill rate" />
        )}
      </div>
      <Money label="Capital tied up" figure={figures?.moneyTiedUp} difference={edited?.moneyTiedUp} {...money} />
      <Money label="Cost a year" figure={figures?.costPerYear} difference={edited?.costPerYear} {...money} />
    </>
  );
}

function Ruler({ figures, edited, isLive }: { figures: StripFigures; edited: Figure | null; isLive: boolean }) {
  const { acceptedRisk, p05, p50, atRisk } = figures;
  const names = [
    { name: "P5", figure: p05 },
    { name: percentileName(acceptedRisk), figure: atRisk },
    { name: "P50", figure: p50 },
  ].filter(({ name }, i, all) => all.findIndex((other) => other.name === name) === i);
  return (
    <>
      <p className="flex justify-between gap-2 text-s whitespace-nowrap text-ink-2">
        <span>
          <span className="hidden min-[86.25rem]:inline">Weekly fill rate</span>
          <span className="min-[86.25rem]:hidden">Fill rate</span>
        </span>
        <span>
          {names.map(({ name, figure }, i) => (
            <span key={name}>
              {i > 0 && " · "}
              <b className="font-semibold">{name}</b> {formatNumber(figure.value * 100, 1)}
            </span>
          ))}
        </span>
      </p>
      <div className="mt-1">
        <ReadingRuler reading={figures} live={edited} isLive={isLive} />
      </div>
    </>
  );
}

type MoneyProps = { label: string; figure?: Figure; difference?: number; isLive: boolean; currency: string };

function Money({ label, figure, difference, isLive, currency }: MoneyProps) {
  if (!figure) {
    return (
      <div className={cell}>
        <Missing label={label} />
      </div>
    );
  }
  return (
    <div className={cell}>
      <p className="mb-[3px] text-s text-ink-2">{label}</p>
      <p className="text-l font-[620] tracking-[-.01em] whitespace-nowrap min-[86.25rem]:text-xl">
        <span className="text-[13px] font-normal text-ink-3">{currency}</span> {formatMoney(figure.value)}
      </p>
      <p className="text-s whitespace-nowrap text-water-700">
        {isLive ? "about, live" : difference !== undefined && describeDifference(difference)}
      </p>
    </div>
  );
}

function describeDifference(difference: number): string {
  return Math.abs(difference) < 50 ? "about the same if kept" : `${withSign(formatMoney(difference))} if kept`;
}

function Missing({ label }: { label: string }) {
  return (
    <>
      <p className="mb-[3px] text-s text-ink-2">{label}</p>
      <p className="text-xl text-ink-3" aria-label="not run yet">
        –
      </p>
    </>
  );
}
