"use client";

import { useState } from "react";
import { NameDialog } from "@/components/line/name-dialog";
import { ConfirmDialog } from "@/components/ui/confirm-dialog";
import { Menu, MenuItem, MenuRule } from "@/components/ui/menu";
import { toast } from "@/components/ui/toast";
import type { LineSummary } from "@/lib/schema/lines";
import { can, type Role } from "@/lib/schema/roles";
import { deleteLineAction, renameLineAction } from "../actions";

export function LineRowMenu({ line: { id, name }, role }: { line: LineSummary; role: Role }) {
  const [open, setOpen] = useState<"rename" | "delete" | null>(null);
  return (
    <>
      <Menu label={`More for ${name}`}>
        <MenuItem href={`/api/lines/${id}/export`}>Export file</MenuItem>
        {can(role, "edit") && <MenuItem onSelect={() => setOpen("rename")}>Rename line</MenuItem>}
        {can(role, "deleteLine") && (
          <>
            <MenuRule />
            <MenuItem onSelect={() => setOpen("delete")}>Delete line</MenuItem>
          </>
        )}
      </Menu>
      <NameDialog
        isOpen={open === "rename"}
        onClose={() => setOpen(null)}
        title={`Rename ${name}`}
        action="Rename line"
        initialName={name}
        submit={(next) => renameLineAction({ lineId: id, name: next })}
      />
      <ConfirmDialog
        open={open === "delete"}
        onClose={() => setOpen(null)}
        title={`Delete ${name}?`}
        description="Its scenarios, kept versions and results go with it, and shared links to it stop working. This cannot be undone."
        action="Delete line"
        onConfirm={async () => {
          const result = await deleteLineAction({ lineId: id });
          if (!result.ok) return result.message;
          toast(`Deleted ${name}.`);
          return null;
        }}
      />
    </>
  );
}
