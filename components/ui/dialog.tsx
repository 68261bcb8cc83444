"use client";

import { Dialog as Radix } from "radix-ui";
import type { ReactNode } from "react";
import { cx } from "./cx";

type Props = {
  open: boolean;
  onOpenChange?(open: boolean): void;
  /** A question or what the sheet is about. */
  title: string;
  description?: string;
  children?: ReactNode;
  isWide?: boolean;
};

/** A square sheet over the page; the safe answer comes first, the action last. Without `onOpenChange` it asks for an answer. */
export function Dialog({ open, onOpenChange, title, description, children, isWide = false }: Props) {
  const keep = onOpenChange ? undefined : (event: Event) => event.preventDefault();
  return (
    <Radix.Root open={open} onOpenChange={onOpenChange}>
      <Radix.Portal>
        <Radix.Overlay className="fixed inset-0 z-40 bg-ink/30 dark:bg-black/50" />
        <Radix.Content
          onEscapeKeyDown={keep}
          onPointerDownOutside={keep}
          className={cx(
            "fixed top-1/2 left-1/2 z-50 max-h-[calc(100dvh-32px)] w-[calc(100vw-32px)] -translate-x-1/2 -translate-y-1/2 overflow-y-auto border-[1.5px] border-ink bg-sheet p-5 text-ink shadow-dialog focus-visible:shadow-dialog sm:p-6",
            isWide ? "max-w-[720px]" : "max-w-[460px]",
          )}
          {...(description === undefined ? { "aria-describedby": undefined } : {})}
        >
          <Radix.Title className="text-xl font-title tracking-[-.01em]">{title}</Radix.Title>
          {description !== undefined && (
            <Radix.Description className="mt-1.5 text-ink-2">{description}</Radix.Description>
          )}
          {children}
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}

/** Where a dialog's answers stand: right on a wide screen, one under the other on a phone. */
export function DialogAnswers({ children }: { children: ReactNode }) {
  return (
    <div className="mt-5 flex flex-col-reverse gap-2 *:max-sm:min-h-11 sm:flex-row sm:justify-end">{children}</div>
  );
}
