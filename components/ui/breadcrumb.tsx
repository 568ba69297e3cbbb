import Link from "next/link";
import { Fragment, type ReactNode } from "react";

export interface Crumb {
  label: ReactNode;
  href?: string;
}

/** Where this page stands, above its title. Crumbs without an address are plain words. */
export function Breadcrumb({ crumbs }: { crumbs: readonly Crumb[] }) {
  return (
    <nav aria-label="Where this is" className="text-label text-ink-2">
      {crumbs.map((crumb, index) => (
        <Fragment key={index}>
          {index > 0 && (
            <span aria-hidden="true" className="mx-2">
              /
            </span>
          )}
          {crumb.href ? (
            <Link href={crumb.href} className="text-water underline underline-offset-3">
              {crumb.label}
            </Link>
          ) : (
            <span>{crumb.label}</span>
          )}
        </Fragment>
      ))}
    </nav>
  );
}
