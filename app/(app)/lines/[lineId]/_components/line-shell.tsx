"use client";

import type { ReactNode } from "react";
import { SweepProvider } from "@/components/compare/sweep-store";
import { BarSlots } from "@/components/line/bar-slot";
import { LineMasthead } from "@/components/line/line-masthead";
import { ResultStrip } from "@/components/line/result-strip";
import { ScenarioBar } from "@/components/line/scenario-bar";
import { StaleDialog } from "@/components/line/stale-dialog";
import { SizingProvider } from "@/components/sizing/sizing-store";
import { ShareActionsContext } from "@/components/share/share-actions";
import { LineProvider } from "@/lib/client/line-provider";
import { SimulationProvider } from "@/lib/client/use-simulation";
import type { LineDetail, ScenarioDetail } from "@/lib/schema/lines";
import {
  createShareAction,
  deleteScenarioAction,
  keepVersionAction,
  markBaseAction,
  renameScenarioAction,
  revokeShareAction,
  saveAsScenarioAction,
} from "../actions";
import { LineAway } from "./line-away";

type Props = { line: LineDetail; initial: ScenarioDetail; userName: string; children: ReactNode };

const actions = {
  keepVersion: keepVersionAction,
  saveAsScenario: saveAsScenarioAction,
  renameScenario: renameScenarioAction,
  deleteScenario: deleteScenarioAction,
  markBase: markBaseAction,
};

const shareActions = { createShare: createShareAction, revokeShare: revokeShareAction };

/** The frame of all views of a line: masthead, scenario bar, the view, result strip. */
export function LineShell({ line, initial, userName, children }: Props) {
  return (
    <SimulationProvider>
      <LineProvider
        detail={line}
        initial={initial}
        actions={actions}
        whileAway={(state) => <LineAway lineName={line.name} {...state} />}
      >
        <ShareActionsContext value={shareActions}>
          <SweepProvider>
            <SizingProvider>
              <BarSlots>
                <div className="flex h-dvh flex-col overflow-hidden print:block print:h-auto print:overflow-visible">
                  <LineMasthead userName={userName} />
                  <ScenarioBar />
                  <main
                    id="main"
                    tabIndex={0}
                    className="relative flex min-h-0 flex-1 flex-col overflow-auto focus-visible:shadow-[inset_0_0_0_2px_var(--water-600)] print:overflow-visible"
                  >
                    {children}
                  </main>
                  <ResultStrip />
                </div>
                <StaleDialog />
              </BarSlots>
            </SizingProvider>
          </SweepProvider>
        </ShareActionsContext>
      </LineProvider>
    </SimulationProvider>
  );
}
