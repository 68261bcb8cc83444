"use client";

import { useRef, useState } from "react";
import { Menu, MenuItem, MenuRule } from "@/components/ui/menu";
import { toast } from "@/components/ui/toast";
import { describeError, fetchJson } from "@/lib/client/api";
import { useLine } from "@/lib/client/line-state";
import type { ActionResult } from "@/lib/errors";
import type { VersionDetail } from "@/lib/schema/lines";
import { DeleteScenarioDialog } from "./delete-scenario-dialog";
import { readImport } from "./import-file";
import { NameDialog } from "./name-dialog";
import { ProblemDialog, type Problem } from "./problem-dialog";
import { VersionsDialog } from "./versions-dialog";

type Open = "rename" | "delete" | "versions" | null;

/** What is done less often with a scenario: its name, its kept versions, its file. */
export function ScenarioMenu() {
  const { line, scenario, mayEdit, apply, bringBack, undo, renameScenario, markBase } = useLine();
  const [open, setOpen] = useState<Open>(null);
  const [problem, setProblem] = useState<Problem | null>(null);
  const picker = useRef<HTMLInputElement>(null);
  const undoable = { action: { label: "Undo", onClick: undo } };

  async function report(title: string, act: Promise<ActionResult<unknown>>, done: string): Promise<void> {
    const result = await act;
    if (result.ok) toast(done);
    else setProblem({ title, message: result.message });
  }

  async function importFile(file: File): Promise<void> {
    try {
      apply(await readImport(file));
      toast(`Imported ${file.name}.`, undoable);
    } catch (error) {
      setProblem({ title: `${file.name} was not imported`, message: describeError(error) });
    }
  }

  async function takeVersion(id: string): Promise<void> {
    setOpen(null);
    try {
      const version = await fetchJson<VersionDetail>(`/api/versions/${id}`);
      bringBack(version);
      toast(`Version ${version.number} is in the draft.`, undoable);
    } catch (error) {
      setProblem({ title: "The version could not be read", message: describeError(error) });
    }
  }

  return (
    <>
      <Menu label={`More for ${scenario.name}`}>
        <MenuItem onSelect={() => setOpen("versions")}>Kept versions</MenuItem>
        {mayEdit && <MenuItem onSelect={() => setOpen("rename")}>Rename scenario</MenuItem>}
        {mayEdit && !scenario.isBase && (
          <MenuItem onSelect={() => void report("Not marked", markBase(), `${scenario.name} is the base now.`)}>
            Mark as base
          </MenuItem>
        )}
        <MenuRule />
        <MenuItem href={`/api/lines/${line.id}/export?scenario=${scenario.id}`}>Export file</MenuItem>
        {mayEdit && <MenuItem onSelect={() => picker.current?.click()}>Import file</MenuItem>}
        {mayEdit && !scenario.isBase && (
          <>
            <MenuRule />
            <MenuItem onSelect={() => setOpen("delete")}>Delete scenario</MenuItem>
          </>
        )}
      </Menu>
      <input
        ref={picker}
        type="file"
        accept="application/json,.json"
        hidden
        aria-label="Line file"
        onChange={({ target }) => {
          const [file] = target.files ?? [];
          target.value = "";
          if (file) void importFile(file);
        }}
      />
      <NameDialog
        title="Rename this scenario"
        action="Rename"
        initialName={scenario.name}
        isOpen={open === "rename"}
        onClose={() => setOpen(null)}
        submit={renameScenario}
      />
      <DeleteScenarioDialog isOpen={open === "delete"} onClose={() => setOpen(null)} />
      <VersionsDialog
        isOpen={open === "versions"}
        onClose={() => setOpen(null)}
        onTake={(id) => void takeVersion(id)}
      />
      <ProblemDialog problem={problem} onClose={() => setProblem(null)} />
    </>
  );
}
