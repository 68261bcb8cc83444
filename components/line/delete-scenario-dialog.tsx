"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { toast } from "@/components/ui/toast";
import { useLine } from "@/lib/client/line-state";

/** Asks before a scenario and its kept versions go for good. */
export function DeleteScenarioDialog({ isOpen, onClose }: { isOpen: boolean; onClose(): void }) {
  const { scenario, deleteScenario } = useLine();
  const [error, setError] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);
  const nVersions = scenario.versions.length;

  async function deleteNow(): Promise<void> {
    setBusy(true);
    const result = await deleteScenario();
    setBusy(false);
    if (!result.ok) return setError(result.message);
    toast(`Deleted ${scenario.name}.`);
    onClose();
  }

  return (
    <Dialog
      open={isOpen}
      onOpenChange={(open) => !open && onClose()}
      title={`Delete ${scenario.name}?`}
      description={`Its draft and its ${nVersions === 1 ? "kept version" : `${nVersions} kept versions`} go with it, and shared links to them stop working. This cannot be undone.`}
    >
      {error && (
        <p role="alert" className="mt-3 text-m text-silt-700">
          {error}
        </p>
      )}
      <div className="mt-5 flex justify-end gap-2">
        <Button onClick={onClose}>Leave it</Button>
        <Button kind="stop" disabled={isBusy} onClick={() => void deleteNow()}>
          Delete scenario
        </Button>
      </div>
    </Dialog>
  );
}
