"use client";

import { createContext, use } from "react";
import type { Line } from "@/lib/line/types";
import type { ScenarioOptions } from "@/lib/schema/lines";
import type { RunOptions, RunResult } from "@/lib/simulation/types";
import type { Evaluate, FrontierPoint, Objective, SizeRange, SizingProblem } from "@/lib/sizing";
import type { SearchProgress } from "@/lib/sizing/find-sizes";
import type { SimulationClient } from "./simulation-client";

/** What is asked of a search; the accepted risk asked for comes first, the others of the frontier after it. */
export type SizingQuestion = {
  targetFillRate: number;
  acceptedRisk: number;
  objective: Objective;
  /** Of all buffers; those held fixed keep their size. */
  ranges: (Omit<SizeRange, "min" | "max" | "step"> & {
    isFixed: boolean;
    min: number | null;
    max: number | null;
    step: number | null;
  })[];
};

/** A set of sizes run beside the search: today's, or what a formula says. */
export type OtherSet = { sizes: Record<string, number>; result: RunResult };

export type SizingSearch = {
  scenarioId: string;
  /** Of the line searched. */
  digest: string;
  line: Line;
  problem: SizingProblem;
  options: ScenarioOptions;
  status: "running" | "stopped" | "done" | "failed";
  error: string | null;
  /** 0..1, about. */
  share: number;
  evaluations: number;
  /** Time spent so far, ms. */
  spentMs: number;
  best: SearchProgress["best"];
  frontier: readonly FrontierPoint[];
  today: OtherSet | null;
  /** Null: not run, or no formula applies to any buffer. */
  textbook: OtherSet | null;
  averages: OtherSet | null;
  /** Further confirmations asked for, by accepted risk. */
  again: ReadonlyMap<number, RunResult[]>;
};

export type SizingState = {
  question: SizingQuestion;
  ask(change: Partial<SizingQuestion>): void;
  /** Of the scenario on screen; null: none yet. */
  search: SizingSearch | null;
  /** Whether the question or the line has changed since. */
  isStale: boolean;
  /** Why no search can start, or null. */
  refusal: string | null;
  start(): void;
  cancel(): void;
  resume(): void;
  /** Runs a found set on weeks of yet another seed phrase. */
  confirmAgain(point: FrontierPoint): void;
  isConfirming: boolean;
};

export const SizingContext = createContext<SizingState | null>(null);

export function useSizing(): SizingState {
  const state = use(SizingContext);
  if (!state) throw new Error("useSizing outside SizingProvider");
  return state;
}

/** Accepted risks of the frontier. */
export const frontierRisks = [0.3, 0.2, 0.15, 0.1, 0.05, 0.02, 0.01];

/** The risk asked for first, then the others of the frontier, the nearest first. */
export function orderRisks(asked: number): number[] {
  const distance = (risk: number) => Math.abs(Math.log(risk / asked));
  const others = frontierRisks.filter((risk) => Math.abs(risk - asked) > 1e-9);
  return [asked, ...others.sort((a, b) => distance(a) - distance(b))];
}

/**
 * Runs lines on the page's workers; whatever the user runs meanwhile goes first. A few lines are cut into blocks so that
 * all workers have work, many are handed out whole.
 */
export function createEvaluate(client: SimulationClient, signal: AbortSignal): Evaluate {
  const hooks = { signal, priority: "search" } as const;
  return (lines: Line[], options: RunOptions) =>
    lines.length < 2 * client.nWorkers
      ? Promise.all(lines.map((line) => client.run(line, options, hooks)))
      : client.runMany(lines, options, hooks);
}
