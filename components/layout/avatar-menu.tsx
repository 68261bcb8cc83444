"use client";

import { useState, useSyncExternalStore } from "react";
import { Menu, MenuHeading, MenuItem, MenuRule } from "@/components/ui/menu";
import { signOut } from "@/lib/client/auth-client";
import { loadPage } from "@/lib/client/load-page";
import { chooseTheme, readTheme, type Theme, themes } from "./theme";

const themeWords: Record<Theme, string> = { system: "As the system", light: "Light", dark: "Dark" };

/** Initials of the first and last name. */
function initialsOf(name: string): string {
  const words = name.trim().split(/\s+/);
  return [words[0], words.length > 1 ? words[words.length - 1] : ""]
    .map((word) => word.charAt(0).toUpperCase())
    .join("");
}

const cookieTheme = () => readTheme(/(?:^|; )theme=(\w+)/.exec(document.cookie)?.[1]);

export function AvatarMenu({ userName }: { userName: string }) {
  const [error, setError] = useState<string | null>(null);
  const [, redraw] = useState(0);
  const theme = useSyncExternalStore(
    () => () => {},
    cookieTheme,
    () => "system" as Theme,
  );

  async function leave() {
    const problem = await signOut();
    if (problem) setError(problem);
    else loadPage("/sign-in");
  }

  return (
    <>
      {error && (
        <span role="alert" className="text-s text-silt-700">
          {error}
        </span>
      )}
      <Menu
        label={userName}
        trigger={
          <button
            type="button"
            aria-label={`Account of ${userName}`}
            className="grid size-[30px] shrink-0 place-items-center rounded-full border border-rule-2 text-[12px] font-[620] text-ink-2 hover:border-ink focus-visible:rounded-full max-sm:size-11"
          >
            {initialsOf(userName)}
          </button>
        }
      >
        <MenuHeading>{userName}</MenuHeading>
        <MenuItem href="/account">Account</MenuItem>
        <MenuRule />
        <MenuHeading>Light and dark</MenuHeading>
        {themes.map((choice) => (
          <MenuItem
            key={choice}
            isChosen={choice === theme}
            onSelect={() => {
              chooseTheme(choice);
              redraw((n) => n + 1);
            }}
          >
            {themeWords[choice]}
          </MenuItem>
        ))}
        <MenuRule />
        <MenuItem onSelect={() => void leave()}>Sign out</MenuItem>
      </Menu>
    </>
  );
}
