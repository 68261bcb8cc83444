"use client";

import { type ReactNode, useCallback, useEffect, useMemo, useRef, useState } from "react";
import { describeError } from "@/lib/client/api";
import { useLine } from "@/lib/client/line-state";
import {
  createEvaluate,
  orderRisks,
  type OtherSet,
  SizingContext,
  type SizingQuestion,
  type SizingSearch,
  type SizingState,
} from "@/lib/client/use-sizing";
import { useSimulation } from "@/lib/client/use-simulation";
import type { Line } from "@/lib/line/types";
import type { RunOptions } from "@/lib/simulation/types";
import { type Checkpoint, findSizes, type FrontierPoint, suggestBounds, withSizes } from "@/lib/sizing";
import { averageSizes, textbookSizes } from "@/lib/sizing/textbook";
import { asksSame, refuseQuestion } from "./question-rules";

/** Keeps the search for sizes while one moves between the views of a line. */
export function SizingProvider({ children }: { children: ReactNode }) {
  const { scenario, parsed, digest, options } = useLine();
  const client = useSimulation();
  const [asked, setAsked] = useState<{ scenarioId: string; change: Partial<SizingQuestion> }>({
    scenarioId: scenario.id,
    change: {},
  });
  const [search, setSearch] = useState<SizingSearch | null>(null);
  const [isConfirming, setConfirming] = useState(false);
  const abort = useRef<AbortController | null>(null);
  const checkpoint = useRef<Checkpoint | undefined>(undefined);
  useEffect(() => () => abort.current?.abort(), []);

  const change = asked.scenarioId === scenario.id ? asked.change : null;
  const question = useMemo((): SizingQuestion => {
    const suggested = parsed ? suggestBounds(parsed).map((range) => ({ ...range, isFixed: false })) : [];
    const typed = new Map(change?.ranges?.map((range) => [range.id, range]));
    return {
      targetFillRate: options.targetFillRate,
      acceptedRisk: options.acceptedRisk,
      objective: "moneyTiedUp",
      ...change,
      ranges: suggested.map((range) => typed.get(range.id) ?? range),
    };
  }, [change, options.acceptedRisk, options.targetFillRate, parsed]);

  const refusal = refuseQuestion(question, parsed);
  const own = search?.scenarioId === scenario.id ? search : null;
  const isStale = own !== null && (own.digest !== digest || !asksSame(own, question));

  const go = useCallback(
    async (first: SizingSearch, resume?: Checkpoint) => {
      abort.current?.abort();
      const controller = (abort.current = new AbortController());
      const { signal } = controller;
      const startedAt = performance.now();
      const show = (next: Partial<SizingSearch>) => {
        if (signal.aborted) return;
        const spentMs = first.spentMs + performance.now() - startedAt;
        setSearch((now) => (now === null ? now : { ...now, ...next, ...furthest(now, next), spentMs }));
      };
      setSearch({ ...first, status: "running", error: null });
      const evaluate = createEvaluate(client, signal);
      const { problem } = first;
      const { seed, replications, weeks, warmupWeeks, targetFillRate } = problem;
      const runOptions: RunOptions = { seed, replications, weeks, warmupWeeks, targetFillRate };
      const runSet = async (sizes: Record<string, number>): Promise<OtherSet> => {
        const [result] = await evaluate([withSizes(problem.line, sizes)], runOptions);
        return { sizes, result };
      };
      try {
        // What is found first must not wait for what it is held against. Settles with what it failed with.
        let others: Promise<unknown> | null = null;
        await findSizes(
          problem,
          evaluate,
          ({ share, evaluations, best, frontier, checkpoint: reached }) => {
            if (!signal.aborted) checkpoint.current = reached;
            show({ share, evaluations: first.evaluations + evaluations, best, frontier });
            if (frontier.length > 0 && !first.averages)
              others ??= runOthers(problem.line, first.options.acceptedRisk, runSet, show).catch((error) => error);
          },
          { signal, resume },
        );
        const failed = await others;
        if (failed) throw failed;
        show({ status: "done", share: 1 });
      } catch (error) {
        show({ status: "failed", error: describeError(error) });
      }
    },
    [client],
  );

  const confirm = useCallback(
    async (of: SizingSearch, point: FrontierPoint): Promise<void> => {
      const { problem } = of;
      const { replications, weeks, warmupWeeks, targetFillRate } = problem;
      const before = of.again.get(point.acceptedRisk) ?? [];
      const seed = `${problem.seed}/unseen ${before.length + 2}`;
      try {
        const result = await client.run(withSizes(problem.line, point.sizes), {
          seed,
          replications,
          weeks,
          warmupWeeks,
          targetFillRate,
        });
        setSearch((now) =>
          now && now.problem === problem
            ? { ...now, again: new Map([...now.again, [point.acceptedRisk, [...before, result]]]) }
            : now,
        );
      } catch (error) {
        setSearch((now) => (now && now.problem === problem ? { ...now, error: describeError(error) } : now));
      }
    },
    [client],
  );

  const state = useMemo(
    (): SizingState => ({
      question,
      ask: (next) =>
        setAsked((now) => ({
          scenarioId: scenario.id,
          change: { ...(now.scenarioId === scenario.id ? now.change : {}), ...next },
        })),
      search: own,
      isStale,
      refusal,
      isConfirming,
      start() {
        if (!parsed || !digest || refusal) return;
        const { targetFillRate, acceptedRisk, objective, ranges } = question;
        const { seed, replications, weeks, warmupWeeks } = options;
        checkpoint.current = undefined;
        void go({
          scenarioId: scenario.id,
          digest,
          line: parsed,
          options: { ...options, targetFillRate, acceptedRisk },
          problem: {
            line: parsed,
            buffers: ranges.flatMap(({ id, isFixed, min, max, step }) =>
              isFixed ? [] : [{ id, min: min!, max: max!, step: step! }],
            ),
            targetFillRate,
            acceptedRisks: orderRisks(acceptedRisk),
            objective,
            seed,
            replications,
            weeks,
            warmupWeeks,
          },
          status: "running",
          error: null,
          share: 0,
          evaluations: 0,
          spentMs: 0,
          best: null,
          frontier: [],
          today: null,
          textbook: null,
          averages: null,
          again: new Map(),
        });
      },
      cancel() {
        abort.current?.abort();
        setSearch((now) => (now?.status === "running" ? { ...now, status: "stopped" } : now));
      },
      resume() {
        if (own && own.status !== "running") void go(own, checkpoint.current);
      },
      confirmAgain(point) {
        if (!own) return;
        setConfirming(true);
        void confirm(own, point).finally(() => setConfirming(false));
      },
    }),
    [confirm, digest, go, isConfirming, isStale, options, own, parsed, question, refusal, scenario.id],
  );

  return <SizingContext value={state}>{children}</SizingContext>;
}

/** A search that goes on repeats from its checkpoint what it had come to; the page does not go back with it. */
function furthest(now: SizingSearch, { frontier = [], share = 0 }: Partial<SizingSearch>) {
  return {
    frontier: frontier.length < now.frontier.length ? now.frontier : frontier,
    share: Math.max(now.share, share),
  };
}

async function runOthers(
  line: Line,
  acceptedRisk: number,
  runSet: (sizes: Record<string, number>) => Promise<OtherSet>,
  show: (next: Partial<SizingSearch>) => void,
): Promise<void> {
  const textbook = textbookSizes(line, acceptedRisk).flatMap((one) => (one.applies ? [[one.id, one.size]] : []));
  const today = sizesToday(line);
  show({ today: await runSet(today) });
  if (textbook.length > 0) show({ textbook: await runSet({ ...today, ...Object.fromEntries(textbook) }) });
  const averages = averageSizes(line);
  if (Object.keys(averages).length > 0) show({ averages: await runSet({ ...today, ...averages }) });
}

function sizesToday(line: Line): Record<string, number> {
  return Object.fromEntries(line.nodes.flatMap((node) => (node.kind === "buffer" ? [[node.id, node.size]] : [])));
}
