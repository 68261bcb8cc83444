"use client";

import { useState } from "react";
import { type Confirmation as Row, ConfirmRuler } from "@/components/charts/confirm-ruler";
import { Button } from "@/components/ui/button";
import { useLine } from "@/lib/client/line-state";
import { type SizingSearch, useSizing } from "@/lib/client/use-sizing";
import { formatChosenPercent, formatCount, formatMoneyFigure, formatShare, weeksOf } from "@/lib/format";
import { percentile } from "@/lib/simulation";
import type { FrontierPoint } from "@/lib/sizing";
import { KeepSetDialog } from "./keep-set-dialog";

/** Whether a found set keeps to its risk on weeks that the search has not seen. */
export function Confirmation({ search, point }: { search: SizingSearch; point: FrontierPoint }) {
  const { confirmAgain, isConfirming } = useSizing();
  const { mayEdit, document } = useLine();
  const [isKeeping, setKeeping] = useState(false);
  const { acceptedRisk, searched, confirmed, reached } = point;
  const more = search.again.get(acceptedRisk) ?? [];
  const rows: Row[] = [
    { key: "searched", name: "search weeks", risk: searched.summary.risk, isSearched: true },
    ...[confirmed, ...more].map((result, i) => ({
      key: result.options.seed,
      name: i === 0 ? "unseen weeks" : `unseen weeks ${i + 1}`,
      risk: result.summary.risk,
      isSearched: false,
    })),
  ];
  const { replications, weeks, seed } = confirmed.options;
  const risk = formatShare(confirmed.summary.risk);
  const rate = formatShare(percentile(confirmed, acceptedRisk));
  const money = formatMoneyFigure(confirmed.summary.moneyTiedUp, document.money.currency ?? "");
  const cost = formatMoneyFigure(confirmed.summary.costPerYear.total, document.money.currency ?? "");
  const { reached: met, of } = weeksOf(acceptedRisk);
  const isWithin = searched.summary.risk.value <= acceptedRisk;
  return (
    <section className="border-t border-ink pt-3">
      <h2 className="figure-title">
        {reached
          ? "It holds on weeks it has not seen"
          : isWithin
            ? "It held on the search’s weeks, but not on unseen ones"
            : "No set in range keeps to this risk"}
      </h2>
      <div className="mt-1 grid gap-x-6 gap-y-2 sm:grid-cols-2">
        <ConfirmRuler rows={rows} acceptedRisk={acceptedRisk} />
        <div>
          <p>
            Run on {formatCount(replications * weeks)} unseen weeks (seed phrase{" "}
            <span className="font-mono">{seed}</span>): risk <b className="font-[640]">{risk.value}</b> {risk.spread},
            and in {formatCount(met)} of {formatCount(of)} weeks at least <b className="font-[640]">{rate.value}</b>{" "}
            {rate.spread}. It ties up {money.value} {money.spread} and costs {cost.value} {cost.spread} a year.
          </p>
          <div className="mt-2 flex flex-wrap gap-2">
            <Button size="small" disabled={isConfirming} onClick={() => confirmAgain(point)}>
              {isConfirming ? "Running unseen weeks" : "Confirm on further weeks"}
            </Button>
            {mayEdit && (
              <Button size="small" onClick={() => setKeeping(true)}>
                Keep as a scenario
              </Button>
            )}
          </div>
        </div>
      </div>
      {!reached && isWithin && (
        <p className="caution mt-2 text-ink-2">
          The set sits so close to {formatChosenPercent(acceptedRisk)} that chance decides on which side it falls. Take
          the next step of the terrace, or search with more weeks.
        </p>
      )}
      {isKeeping && (
        <KeepSetDialog
          search={search}
          sizes={point.sizes}
          acceptedRisk={acceptedRisk}
          searched={searched}
          onClose={() => setKeeping(false)}
        />
      )}
    </section>
  );
}
