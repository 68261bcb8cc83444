"use client";

import { usePathname, useRouter, useSearchParams } from "next/navigation";
import { useCallback, useState } from "react";
import useSWR from "swr";
import type { LineDetail, ScenarioDetail } from "@/lib/schema/lines";
import { fetchJson, scenarioKey } from "./api";

/** The scenario named in the address (`?scenario=`), else the base. The one shown before stays until the new one is read. */
export function useScenarioChoice(line: LineDetail, initial: ScenarioDetail) {
  const router = useRouter();
  const pathname = usePathname();
  const search = useSearchParams();
  const asked = search.get("scenario");
  const base = line.scenarios.find(({ isBase }) => isBase);
  const chosenId = line.scenarios.find(({ id }) => id === asked)?.id ?? base?.id ?? initial.id;

  const { data, error, mutate } = useSWR<ScenarioDetail>(scenarioKey(chosenId), fetchJson, {
    fallbackData: chosenId === initial.id ? initial : undefined,
    revalidateOnMount: true,
  });
  const [shown, setShown] = useState<ScenarioDetail | null>(data ?? null);
  if (data && data !== shown) setShown(data);

  const select = useCallback(
    (id: string) => {
      const next = new URLSearchParams(search);
      if (id === base?.id) next.delete("scenario");
      else next.set("scenario", id);
      const query = next.toString();
      router.push((query ? `${pathname}?${query}` : pathname) as Parameters<typeof router.push>[0], { scroll: false });
    },
    [base?.id, pathname, router, search],
  );
  return {
    scenario: data ?? shown,
    isSwitching: !data && shown !== null,
    error: data ? null : (error as Error | undefined),
    retry: () => void mutate(),
    select,
  };
}
