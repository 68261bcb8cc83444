import { useSyncExternalStore } from "react";

/** Whether a media query holds; null on the server, which has no screen. */
export function useMediaQuery(query: string): boolean | null {
  return useSyncExternalStore(
    (listener) => {
      const list = window.matchMedia(query);
      list.addEventListener("change", listener);
      return () => list.removeEventListener("change", listener);
    },
    () => window.matchMedia(query).matches,
    () => null,
  );
}
