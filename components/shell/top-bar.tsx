"use client";

import Link from "next/link";
import { usePathname } from "next/navigation";
import type { Role } from "@/lib/schemas/person";
import { StepwellMark } from "@/components/brand/stepwell-mark";
import { Button } from "@/components/ui/button";
import { classNames } from "@/components/ui/class-names";
import { PersonMenu } from "./person-menu";
import type { Theme } from "./theme";
import { ThemeSwitch } from "./theme-switch";

export interface TopBarProps {
  siteName: string;
  person: { name: string; roles: readonly Role[] };
  theme: Theme;
  onSignOut: () => void;
  /** The sign-out is under way. */
  isSigningOut?: boolean;
}

const PLACES = [
  { href: "/benches", label: "Benches" },
  { href: "/runs", label: "Runs" },
  { href: "/recipes", label: "Recipes" },
] as const;

export function TopBar({ siteName, person, theme, onSignOut, isSigningOut = false }: TopBarProps) {
  const roles = person.roles.join(", ");
  return (
    <header
      data-screen-only
      className="flex flex-wrap items-stretch gap-x-7 border-b border-line bg-panel px-4 sm:h-12 sm:px-6"
    >
      <a
        href="#content"
        className="sr-only rounded bg-water px-3 py-2 text-water-ink focus:not-sr-only focus:absolute focus:top-1 focus:left-1 focus:z-50"
      >
        To the content
      </a>
      <Link href="/benches" className="flex h-12 items-center gap-2.5 text-state font-bold tracking-[-0.01em] text-ink">
        <StepwellMark />
        Stepwell
      </Link>
      <PlaceLinks />
      <div className="ml-auto flex items-center gap-4.5 text-[0.875rem]">
        <span className="text-ink-2 max-lg:hidden">{siteName}</span>
        <PersonMenu name={person.name} roles={roles}>
          <div className="text-small">
            <p className="font-semibold">{person.name}</p>
            <p className="text-ink-2">{roles}</p>
            <p className="text-ink-2 lg:hidden">{siteName}</p>
          </div>
          <ThemeSwitch theme={theme} />
          <Button size="small" onClick={onSignOut} busy={isSigningOut}>
            Sign out
          </Button>
        </PersonMenu>
      </div>
    </header>
  );
}

/** On a narrow screen the places take a row of their own, under the brand. */
function PlaceLinks() {
  const pathname = usePathname() ?? "";
  return (
    <nav
      aria-label="Places"
      className="flex gap-5.5 max-sm:order-last max-sm:-mx-4 max-sm:w-[calc(100%+2rem)] max-sm:border-t max-sm:border-line max-sm:px-4"
    >
      {PLACES.map(({ href, label }) => {
        const isHere = pathname === href || pathname.startsWith(`${href}/`);
        return (
          <Link
            key={href}
            href={href}
            aria-current={isHere ? "page" : undefined}
            className={classNames(
              "flex items-center border-y-[3px] border-transparent no-underline max-sm:h-11",
              isHere ? "border-b-water font-semibold text-ink" : "text-ink-2 hover:text-ink",
            )}
          >
            {label}
          </Link>
        );
      })}
    </nav>
  );
}
