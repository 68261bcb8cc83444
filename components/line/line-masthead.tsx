"use client";

import { usePathname, useSearchParams } from "next/navigation";
import { useState } from "react";
import { Masthead } from "@/components/layout/masthead";
import { ShareDialog } from "@/components/share/share-dialog";
import { Button } from "@/components/ui/button";
import { useLine } from "@/lib/client/line-state";
import { SaveTag } from "./save-tag";

const views = [
  { segment: "sketch", label: "Sketch" },
  { segment: "readings", label: "Readings" },
  { segment: "compare", label: "Compare" },
  { segment: "sizing", label: "Sizing" },
] as const;

/** Where one is, the views of the line, whether it is saved, and the way to share it. */
export function LineMasthead({ userName }: { userName: string }) {
  const { line, mayShare } = useLine();
  const pathname = usePathname();
  const search = useSearchParams().toString();
  const [isSharing, setSharing] = useState(false);
  return (
    <>
      <Masthead
        where={[{ label: line.workspaceName, href: "/lines" }, { label: line.name }]}
        views={views.map(({ segment, label }) => ({
          label,
          href: `/lines/${line.id}/${segment}${search && `?${search}`}`,
          isCurrent: pathname.endsWith(`/${segment}`),
          count: segment === "compare" && line.scenarios.length > 1 ? line.scenarios.length : undefined,
        }))}
        userName={userName}
        end={
          <>
            <SaveTag />
            {mayShare && (
              <Button size="small" onClick={() => setSharing(true)}>
                Share link
              </Button>
            )}
          </>
        }
      />
      <ShareDialog isOpen={isSharing} onClose={() => setSharing(false)} />
    </>
  );
}
