"use client";

import type { Route } from "next";
import { useRouter } from "next/navigation";
import { useRef, useState } from "react";
import { type Problem, ProblemDialog } from "@/components/line/problem-dialog";
import { Button } from "@/components/ui/button";
import { noAnswer } from "@/lib/client/no-answer";
import { limits } from "@/lib/line/limits";
import { createLineAction } from "../actions";

/** Makes a new line out of an exported file or of a bare line document. */
export function OpenFile() {
  const router = useRouter();
  const picker = useRef<HTMLInputElement>(null);
  const [problem, setProblem] = useState<Problem | null>(null);
  const [isBusy, setBusy] = useState(false);

  async function open(file: File) {
    const fail = (message: string) => setProblem({ title: `${file.name} was not opened`, message });
    if (file.size > limits.documentBytes) {
      fail("It is larger than 2 MB, the most that a line may have.");
      return;
    }
    setBusy(true);
    const name = file.name.replace(/\.[^.]*$/, "").slice(0, 120) || "Opened line";
    const text = await file.text().catch(() => null);
    const result = text === null ? null : await createLineAction({ name, from: text }).catch(() => null);
    setBusy(false);
    if (text === null) fail("It could not be read from the disk: it may have been moved or changed meanwhile.");
    else if (result === null) fail(noAnswer);
    else if (result.ok) router.push(`/lines/${result.value.id}/sketch` as Route);
    else fail(result.message);
  }

  return (
    <>
      <Button disabled={isBusy} onClick={() => picker.current?.click()}>
        {isBusy ? "Opening" : "Open a file"}
      </Button>
      <input
        ref={picker}
        type="file"
        accept="application/json,.json"
        aria-label="Line file"
        className="hidden"
        onChange={(event) => {
          const [file] = event.target.files ?? [];
          event.target.value = "";
          if (file) void open(file);
        }}
      />
      <ProblemDialog problem={problem} onClose={() => setProblem(null)} />
    </>
  );
}
