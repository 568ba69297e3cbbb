"use client";

import { useEffect, useRef } from "react";

/** Keys as `KeyboardEvent.key` names them, with `Shift+` before it where Shift is held: `h`, `Shift+Escape`, ` `, `ArrowRight`. */
export type Shortcuts = Readonly<Record<string, (() => void) | undefined>>;

/** Keys of a page. They rest while a person types, and where a control has a use of its own for the key. */
export function useShortcuts(shortcuts: Shortcuts): void {
  const latest = useRef(shortcuts);
  useEffect(() => {
    latest.current = shortcuts;
  }, [shortcuts]);
  useEffect(() => {
    const listen = (event: KeyboardEvent) => {
      const act = event.repeat && !event.key.startsWith("Arrow") ? undefined : latest.current[shortcutName(event)];
      if (!act || event.defaultPrevented || !isFree(event)) return;
      event.preventDefault();
      act();
    };
    window.addEventListener("keydown", listen);
    return () => window.removeEventListener("keydown", listen);
  }, []);
}

function shortcutName(event: KeyboardEvent): string {
  const key = event.key.length === 1 ? event.key.toLowerCase() : event.key;
  return event.shiftKey ? `Shift+${key}` : key;
}

function isFree(event: KeyboardEvent): boolean {
  if (event.ctrlKey || event.metaKey || event.altKey || event.isComposing) return false;
  const target = event.target instanceof Element ? event.target : null;
  if (target?.closest("input, textarea, select, [contenteditable='true']")) return false;
  return !(event.key === " " && target?.closest("button, a, summary, [role='button'], [role='radio'], [role='tab']"));
}
