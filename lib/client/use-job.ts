"use client";

import { useCallback, useEffect, useMemo, useRef, useState } from "react";
import { describeError } from "./api";

export type JobState<Progress, Done> =
  | { status: "idle" }
  | { status: "running"; progress: Progress }
  | { status: "done"; value: Done }
  | { status: "failed"; message: string };

/**
 * One piece of work at a time that can be cancelled. A new one ends the one before, and so does leaving the page;
 * whatever an ended one still reports is dropped.
 */
export function useJob<Progress, Done>() {
  const [state, setState] = useState<JobState<Progress, Done>>({ status: "idle" });
  const abort = useRef<AbortController | null>(null);
  useEffect(() => () => abort.current?.abort(), []);

  const start = useCallback(
    async (first: Progress, work: (signal: AbortSignal, onProgress: (progress: Progress) => void) => Promise<Done>) => {
      abort.current?.abort();
      const own = (abort.current = new AbortController());
      const show = (next: JobState<Progress, Done>) => {
        if (!own.signal.aborted) setState(next);
      };
      setState({ status: "running", progress: first });
      try {
        show({ status: "done", value: await work(own.signal, (progress) => show({ status: "running", progress })) });
      } catch (error) {
        show({ status: "failed", message: describeError(error) });
      }
    },
    [],
  );
  const cancel = useCallback(() => {
    abort.current?.abort();
    setState({ status: "idle" });
  }, []);
  return useMemo(() => ({ state, start, cancel }), [state, start, cancel]);
}
