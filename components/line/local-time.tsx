"use client";

import { useSyncExternalStore } from "react";
import { formatDate, formatDateTime, formatTime } from "@/lib/format";

const formats = { time: formatTime, date: formatDate, dateTime: formatDateTime };

const subscribe = () => () => undefined;

/** An instant in the reader's time zone, which the server does not know; empty until the page is alive. */
export function LocalTime({ at, format = "time" }: { at: string; format?: keyof typeof formats }) {
  const isAlive = useSyncExternalStore(
    subscribe,
    () => true,
    () => false,
  );
  return <time dateTime={at}>{isAlive && formats[format](at)}</time>;
}
