"use client";

import { useEffect, useRef, useState } from "react";
import type { Line } from "@/lib/line/types";
import type { ScenarioOptions } from "@/lib/schema/lines";
import { describeError } from "./api";
import type { Reading } from "./line-state";
import { toLiveOptions, toRunOptions } from "./readings";
import { useSimulation } from "./use-simulation";

const pauseMs = 150;

type Question = { line: Line; digest: string; options: ScenarioOptions };
type Answer = { reading: Reading | null; error: string | null; key: string; scope: string };

/**
 * Keeps a quick run of one line up to date; each change of the question cancels the run before.
 * @param scope - The answer is forgotten when it changes.
 * @param isWanted - False while a full run answers the same question.
 */
export function useLiveRun(
  scope: string,
  line: Line | null,
  digest: string | null,
  options: ScenarioOptions,
  isWanted: boolean,
): { live: Reading | null; isLiveRunning: boolean; liveError: string | null } {
  const client = useSimulation();
  const [answer, setAnswer] = useState<Answer | null>(null);
  const key = digest === null ? null : JSON.stringify([digest, toRunOptions(options)]);
  const question = useRef<Question | null>(null);
  useEffect(() => {
    question.current = line && digest !== null ? { line, digest, options } : null;
  });

  useEffect(() => {
    if (key === null || !isWanted) return;
    const abort = new AbortController();
    const run = async (): Promise<void> => {
      if (!question.current) return;
      const { line, digest, options } = question.current;
      const quick = toLiveOptions(options);
      try {
        const result = await client.run(line, toRunOptions(quick), { signal: abort.signal, priority: "live" });
        const reading = { result, digest, options: quick, ranAt: new Date().toISOString(), engine: result.engine };
        setAnswer({ reading, error: null, key, scope });
      } catch (error) {
        if (abort.signal.aborted) return;
        const message = describeError(error);
        setAnswer((last) => ({ reading: last?.scope === scope ? last.reading : null, error: message, key, scope }));
      }
    };
    const timer = setTimeout(() => void run(), pauseMs);
    return () => {
      clearTimeout(timer);
      abort.abort();
    };
  }, [client, key, isWanted, scope]);

  const isAnswered = answer !== null && answer.key === key && answer.scope === scope;
  return {
    live: key !== null && answer?.scope === scope ? answer.reading : null,
    isLiveRunning: key !== null && isWanted && !isAnswered,
    liveError: isAnswered ? answer.error : null,
  };
}
