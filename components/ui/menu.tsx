"use client";

import { DropdownMenu as Radix } from "radix-ui";
import type { ReactNode } from "react";
import { cx } from "./cx";
import { DotsIcon } from "./icons";

type MenuProps = {
  /** Says what the menu is for, where the trigger shows no text. */
  label: string;
  /** What opens it; three dots where there is nothing. */
  trigger?: ReactNode;
  align?: "start" | "end";
  children: ReactNode;
};

export function Menu({ label, trigger, align = "end", children }: MenuProps) {
  return (
    <Radix.Root modal={false}>
      {trigger ? (
        <Radix.Trigger asChild>{trigger}</Radix.Trigger>
      ) : (
        <Radix.Trigger
          aria-label={label}
          title={label}
          className="inline-flex h-8 min-w-8 items-center justify-center rounded-press text-ink-2 hover:bg-water-50 hover:text-ink"
        >
          <DotsIcon />
        </Radix.Trigger>
      )}
      <Radix.Portal>
        <Radix.Content
          align={align}
          sideOffset={4}
          collisionPadding={8}
          className="z-50 min-w-44 border border-ink bg-sheet py-1 text-ink shadow-dialog"
        >
          {children}
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}

const item =
  "flex min-h-8 w-full items-center gap-6 px-3 py-1 no-underline outline-none text-ink data-[disabled]:text-ink-3 data-[highlighted]:bg-water-100 max-sm:min-h-11";

type ItemProps = {
  onSelect?(): void;
  href?: string;
  shortcut?: string;
  disabled?: boolean;
  /** One of several, of which one holds. */
  isChosen?: boolean;
  children: ReactNode;
};

/** One thing to do, or a place to go. */
export function MenuItem({ onSelect, href, shortcut, disabled, isChosen, children }: ItemProps) {
  const content = (
    <>
      <span className={cx("flex-1", isChosen && "font-strong")}>{children}</span>
      {shortcut && <kbd className="font-typed text-[11.5px] text-ink-3">{shortcut}</kbd>}
    </>
  );
  return href ? (
    <Radix.Item asChild onSelect={onSelect}>
      <a href={href} className={item}>
        {content}
      </a>
    </Radix.Item>
  ) : (
    <Radix.Item
      className={cx(item, "cursor-pointer")}
      onSelect={onSelect}
      disabled={disabled}
      {...(isChosen === undefined ? {} : { role: "menuitemradio", "aria-checked": isChosen })}
    >
      {content}
    </Radix.Item>
  );
}

export function MenuRule() {
  return <Radix.Separator className="my-1 h-px bg-rule" />;
}

export function MenuHeading({ children }: { children: ReactNode }) {
  return <Radix.Label className="px-3 pt-1 text-s text-ink-3">{children}</Radix.Label>;
}
