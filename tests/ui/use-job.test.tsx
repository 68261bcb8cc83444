import { act, renderHook, waitFor } from "@testing-library/react";
import { expect, it } from "vitest";
import { useJob } from "@/lib/client/use-job";

/** Work that the test ends by hand. */
function createWork() {
  const calls: {
    signal: AbortSignal;
    onProgress(share: number): void;
    finish(value: string): void;
    fail(e: Error): void;
  }[] = [];
  const work = (signal: AbortSignal, onProgress: (share: number) => void) =>
    new Promise<string>((finish, fail) => calls.push({ signal, onProgress, finish, fail }));
  return { calls, work };
}

it("goes from running over progress to done", async () => {
  const { calls, work } = createWork();
  const { result } = renderHook(() => useJob<number, string>());
  expect(result.current.state).toEqual({ status: "idle" });
  act(() => void result.current.start(0, work));
  act(() => calls[0].onProgress(0.5));
  expect(result.current.state).toEqual({ status: "running", progress: 0.5 });
  act(() => calls[0].finish("ready"));
  await waitFor(() => expect(result.current.state).toEqual({ status: "done", value: "ready" }));
});

it("tells in words what failed", async () => {
  const { calls, work } = createWork();
  const { result } = renderHook(() => useJob<number, string>());
  act(() => void result.current.start(0, work));
  act(() => calls[0].fail(new Error("a worker stopped")));
  await waitFor(() => expect(result.current.state).toEqual({ status: "failed", message: "a worker stopped" }));
});

it("drops what ended work still reports, whether cancelled or overtaken", async () => {
  const { calls, work } = createWork();
  const { result } = renderHook(() => useJob<number, string>());
  act(() => void result.current.start(0, work));
  act(() => result.current.cancel());
  expect(calls[0].signal.aborted).toBe(true);
  await act(async () => {
    calls[0].onProgress(0.9);
    calls[0].finish("late");
  });
  expect(result.current.state).toEqual({ status: "idle" });
  act(() => void result.current.start(0, work));
  act(() => void result.current.start(0.1, work));
  expect(calls[1].signal.aborted).toBe(true);
  await act(async () => calls[1].fail(new Error("overtaken")));
  expect(result.current.state).toEqual({ status: "running", progress: 0.1 });
});

it("ends the work when the page is left", () => {
  const { calls, work } = createWork();
  const { result, unmount } = renderHook(() => useJob<number, string>());
  act(() => void result.current.start(0, work));
  unmount();
  expect(calls[0].signal.aborted).toBe(true);
});
