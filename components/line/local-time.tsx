"use client";

import { useSyncExternalStore } from "react";
import { formatTime } from "@/lib/format";

const subscribe = () => () => undefined;

/** A time of day in the reader's time zone, which the server does not know; empty until the page is alive. */
export function LocalTime({ at }: { at: string }) {
  const isAlive = useSyncExternalStore(
    subscribe,
    () => true,
    () => false,
  );
  return <time dateTime={at}>{isAlive && formatTime(at)}</time>;
}
