"use client";

import { createContext, use, useState, type ReactNode } from "react";
import { createPortal } from "react-dom";

type Places = { tools: HTMLElement | null; end: HTMLElement | null };

const PlacesContext = createContext<Places>({ tools: null, end: null });
const SetPlacesContext = createContext<(key: keyof Places, place: HTMLElement | null) => void>(() => undefined);

/** Lets the view on screen put its own tools into the bar that all views of a line share. */
export function BarSlots({ children }: { children: ReactNode }) {
  const [places, setPlaces] = useState<Places>({ tools: null, end: null });
  const [set] = useState(() => (key: keyof Places, place: HTMLElement | null) => {
    setPlaces((last) => (last[key] === place ? last : { ...last, [key]: place }));
  });
  return (
    <SetPlacesContext value={set}>
      <PlacesContext value={places}>{children}</PlacesContext>
    </SetPlacesContext>
  );
}

/** Where the tools of the view appear: "tools" after the scenario, "end" at the right. */
export function BarSlot({ name }: { name: keyof Places }) {
  const set = use(SetPlacesContext);
  const [place] = useState(() => (element: HTMLElement | null) => set(name, element));
  return <div ref={place} className="flex items-center gap-2.5 empty:hidden" />;
}

/** Rendered by a view: its tools for the bar. */
export function BarTools({ slot = "tools", children }: { slot?: keyof Places; children: ReactNode }) {
  const place = use(PlacesContext)[slot];
  return place && createPortal(children, place);
}
