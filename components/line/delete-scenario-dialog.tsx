"use client";

import { ConfirmDialog } from "@/components/ui/confirm-dialog";
import { toast } from "@/components/ui/toast";
import { useLine } from "@/lib/client/line-state";

/** Asks before a scenario and its kept versions go for good. */
export function DeleteScenarioDialog({ isOpen, onClose }: { isOpen: boolean; onClose(): void }) {
  const { scenario, deleteScenario } = useLine();
  const nVersions = scenario.versions.length;
  const versions = nVersions === 1 ? "its kept version" : `its ${nVersions} kept versions`;
  return (
    <ConfirmDialog
      open={isOpen}
      onClose={onClose}
      title={`Delete ${scenario.name}?`}
      description={`Its draft and ${versions} go with it, and links shared from them stop working. This cannot be undone.`}
      action="Delete scenario"
      onConfirm={async () => {
        const result = await deleteScenario();
        if (!result.ok) return result.message;
        toast(`Deleted ${scenario.name}.`);
        return null;
      }}
    />
  );
}
