"use client";

import { Terrace, type TerraceMark, type Tread } from "@/components/charts/terrace";
import { TakeOutFigures } from "@/components/charts/take-out-figures";
import { Button } from "@/components/ui/button";
import { Empty } from "@/components/ui/empty";
import { frontierRisks, type OtherSet, type SizingSearch, useSizing } from "@/lib/client/use-sizing";
import { formatChosenPercent, formatMoney } from "@/lib/format";
import type { RunResult } from "@/lib/simulation/types";
import type { FrontierPoint } from "@/lib/sizing";
import { Confirmation } from "./confirmation";
import { FormulaTable } from "./formula-table";
import { HeldBack } from "./held-back";
import { QuestionBar } from "./question-bar";
import { SearchStatus } from "./search-status";
import { SizesTable } from "./sizes-table";
import { WeekNeeds } from "./week-needs";

/** The cheapest set of buffers for an accepted risk, and what each step of risk costs. */
export function SizingView() {
  const { search } = useSizing();
  return (
    <>
      <QuestionBar />
      <div className="px-4 pt-3 pb-8 sm:px-5">
        {search ? <Found search={search} /> : <NothingYet />}
        <WeekNeeds />
        <p className="mt-4 text-s text-ink-3">
          Estimates from the line as drawn; the cheapest set found, not proof that there is no cheaper one. Stock on the
          floor and in racks: check loads, fire load and rules for hazardous goods with qualified people; for parts on
          which safety depends, keep what your own rules ask for.
        </p>
      </div>
    </>
  );
}

function NothingYet() {
  const { start, refusal } = useSizing();
  return (
    <div className="py-2">
      {refusal ? (
        <Empty title="No search yet">{refusal}</Empty>
      ) : (
        <Empty
          title="No search yet"
          action={
            <Button kind="main" onClick={start}>
              Search sizes
            </Button>
          }
        >
          <p>
            The search runs a few hundred sets of sizes over the same weeks in this browser, sets all buffers against
            one another, and puts the cheapest set found to weeks it has not seen. The first takes about a minute on two
            cores; then the other steps of risk fill in. It can be stopped and gone on with at any time.
          </p>
        </Empty>
      )}
    </div>
  );
}

function Found({ search }: { search: SizingSearch }) {
  const { question, ask } = useSizing();
  const { problem, frontier, line } = search;
  const { currency } = line.money;
  const what = problem.objective === "moneyTiedUp" ? "Capital tied up" : "Cost a year";
  const moneyOf = ({ summary }: RunResult) =>
    problem.objective === "moneyTiedUp" ? summary.moneyTiedUp.value : summary.costPerYear.total.value;
  const point = frontier.find(({ acceptedRisk }) => acceptedRisk === question.acceptedRisk) ?? null;
  const treads = [...new Set([...frontierRisks, ...problem.acceptedRisks])]
    .sort((a, b) => b - a)
    .map((risk): Tread => {
      const found = frontier.find(({ acceptedRisk }) => acceptedRisk === risk);
      return { risk, money: found ? moneyOf(found.confirmed) : null, isReached: found?.reached ?? false };
    });
  return (
    <div>
      <SearchStatus search={search} />
      <div className="mt-3 grid gap-x-6 gap-y-6 xl:grid-cols-[minmax(0,0.95fr)_minmax(0,1fr)] xl:[&>*+*]:border-l xl:[&>*+*]:border-rule xl:[&>*+*]:pl-6">
        <section className="min-w-0">
          <div className="flex flex-wrap items-baseline gap-x-3 gap-y-1">
            <h2 className="text-xl font-title tracking-[-.01em]">{sayTerrace(treads)}</h2>
            <span className="ml-auto">
              <TakeOutFigures
                name={`${line.name} frontier`}
                rows={() => frontierRows(frontier, problem.targetFillRate)}
              />
            </span>
          </div>
          <p className="text-s text-ink-3">
            {what}, {currency}, at the cheapest set found for each accepted risk (share of weeks below{" "}
            {formatChosenPercent(problem.targetFillRate)}), on unseen weeks. A riser is the price of one step.
          </p>
          <Terrace
            treads={treads}
            chosen={question.acceptedRisk}
            marks={marksOf(search, point, moneyOf)}
            currency={currency}
            what={what}
            onChoose={(risk) => ask({ acceptedRisk: risk })}
          />
          {point && <Confirmation search={search} point={point} />}
          {point && !point.reached && point.searched.summary.risk.value > point.acceptedRisk && (
            <HeldBack point={point} line={line} />
          )}
        </section>
        {point ? (
          <SizesTable search={search} point={point} />
        ) : (
          <p className="text-ink-2">
            {search.status === "running"
              ? `The set for ${formatChosenPercent(question.acceptedRisk)} risk is being looked for.`
              : `No set for ${formatChosenPercent(question.acceptedRisk)} risk is known yet.`}
          </p>
        )}
      </div>
      <FormulaTable search={search} point={point} />
    </div>
  );
}

function marksOf(
  { today, textbook, problem }: SizingSearch,
  point: FrontierPoint | null,
  moneyOf: (result: RunResult) => number,
): TerraceMark[] {
  const mark = (set: OtherSet | null, label: string, shape: TerraceMark["shape"]): TerraceMark[] =>
    set ? [{ risk: set.result.summary.risk.value, money: moneyOf(set.result), label, shape }] : [];
  const [now] = mark(today, "Today", "square");
  const spare = now && point?.reached && now.risk >= point.acceptedRisk ? now.money - moneyOf(point.confirmed) : 0;
  const currency = problem.line.money.currency;
  return [
    ...(now ? [{ ...now, note: spare > 0 ? `${formatMoney(spare, currency)} more, at more risk` : undefined }] : []),
    ...mark(textbook, "Textbook", "cross"),
  ];
}

/** The finding of the terrace, as far as it is known. */
function sayTerrace(treads: readonly Tread[]): string {
  const known = treads.filter(({ money }) => money !== null);
  const steps = known.slice(1).map(({ money }, i) => money! - known[i].money!);
  if (known.length < treads.length) return "What each step of risk costs";
  const isSteeper = steps.every((step, i) => i === 0 || step >= steps[i - 1]);
  if (isSteeper) return "Each step down in risk costs more than the last";
  const last = treads.at(-1)!;
  if (!last.isReached) return "Stock reaches only so far down in risk";
  return "What each step of risk costs";
}

function frontierRows(frontier: readonly FrontierPoint[], target: number) {
  const ordered = [...frontier].sort((a, b) => b.acceptedRisk - a.acceptedRisk);
  const ids = Object.keys(ordered[0]?.sizes ?? {});
  return [
    [
      "accepted risk",
      "target fill rate",
      "reached",
      "risk, unseen weeks",
      "risk half-width",
      "capital tied up",
      "capital half-width",
      "cost a year",
      ...ids,
    ],
    ...ordered.map(({ acceptedRisk, reached, confirmed: { summary }, sizes }) => [
      acceptedRisk,
      target,
      reached ? "yes" : "no",
      summary.risk.value,
      summary.risk.halfWidth,
      summary.moneyTiedUp.value,
      summary.moneyTiedUp.halfWidth,
      summary.costPerYear.total.value,
      ...ids.map((id) => sizes[id]),
    ]),
  ];
}
