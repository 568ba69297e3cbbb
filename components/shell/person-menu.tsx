"use client";

import { useEffect, useRef, type ReactNode } from "react";

export interface PersonMenuProps {
  name: string;
  /** What they may do, in words. */
  roles: string;
  children: ReactNode;
}

/** Opens under the person's name; closes by Escape, by a press elsewhere and when focus leaves. */
export function PersonMenu({ name, roles, children }: PersonMenuProps) {
  const menu = useRef<HTMLDetailsElement>(null);
  useEffect(() => {
    const closeUnlessWithin = (event: Event) => {
      if (event.target instanceof Node && !menu.current?.contains(event.target)) menu.current?.removeAttribute("open");
    };
    document.addEventListener("pointerdown", closeUnlessWithin);
    document.addEventListener("focusin", closeUnlessWithin);
    return () => {
      document.removeEventListener("pointerdown", closeUnlessWithin);
      document.removeEventListener("focusin", closeUnlessWithin);
    };
  }, []);
  const closeByEscape = (key: string) => {
    if (key !== "Escape" || !menu.current?.open) return;
    menu.current.open = false;
    menu.current.querySelector("summary")?.focus();
  };
  return (
    <details ref={menu} className="relative" onKeyDown={(event) => closeByEscape(event.key)}>
      <summary className="flex h-12 list-none items-center gap-2 [&::-webkit-details-marker]:hidden">
        <span>
          {name} <span className="text-ink-2 max-sm:sr-only">{roles}</span>
        </span>
        <svg aria-hidden="true" viewBox="0 0 12 8" className="h-2 w-3 text-ink-2">
          <path d="M1 1.5l5 5 5-5" fill="none" stroke="currentColor" strokeWidth="1.6" />
        </svg>
      </summary>
      <div className="absolute top-12 right-0 z-30 grid w-max gap-3 rounded border border-line-strong bg-panel p-4">
        {children}
      </div>
    </details>
  );
}
