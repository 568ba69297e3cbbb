"use client";

import { useState } from "react";
import { Segmented } from "@/components/ui/segmented";
import { THEME_COOKIE, type Theme } from "./theme";

const YEAR_SECONDS = 31_536_000;

const SEGMENTS = [
  { value: "day", label: "Day" },
  { value: "night", label: "Night" },
  { value: "system", label: "System" },
] as const;

/** Day, night, or as the machine has it. Kept in a cookie, so that the server draws the right one at once. */
export function ThemeSwitch({ theme }: { theme: Theme }) {
  const [chosen, setChosen] = useState(theme);
  const choose = (next: Theme) => {
    setChosen(next);
    applyTheme(next);
  };
  return <Segmented label="Theme" value={chosen} segments={SEGMENTS} onChange={choose} />;
}

function applyTheme(theme: Theme): void {
  document.cookie = `${THEME_COOKIE}=${theme}; path=/; max-age=${YEAR_SECONDS}; samesite=lax`;
  document.documentElement.dataset.theme = theme;
}
