import Link from "next/link";
import type { ButtonHTMLAttributes, ReactNode } from "react";
import { classNames } from "./class-names";

export type ButtonVariant = "plain" | "main" | "stop" | "bare";
export type ButtonSize = "normal" | "small" | "touch";

interface Looks {
  variant?: ButtonVariant;
  size?: ButtonSize;
  className?: string;
  children: ReactNode;
}

export interface ActionProps extends Looks, Omit<ButtonHTMLAttributes<HTMLButtonElement>, "className" | "children"> {
  href?: undefined;
  /** Work is under way: the button says so to assistive technology and takes no second press. */
  busy?: boolean;
}

export interface LinkProps extends Looks {
  href: string;
  /** Also shown in a new window, for example a file. */
  target?: "_blank";
  download?: boolean;
  "aria-label"?: string;
  "aria-current"?: "page";
}

export type ButtonProps = ActionProps | LinkProps;

const BASE =
  "inline-flex items-center justify-center gap-2 rounded border font-semibold whitespace-nowrap no-underline select-none " +
  "disabled:cursor-not-allowed disabled:border-line disabled:bg-sunken disabled:text-ink-2";

const VARIANTS: Readonly<Record<ButtonVariant, string>> = {
  plain: "border-line-strong bg-panel text-ink hover:bg-sunken active:bg-line",
  main: "border-water bg-water text-water-ink hover:border-ink active:opacity-90",
  stop: "border-brick bg-brick text-panel hover:border-ink active:opacity-90",
  bare: "border-transparent text-water underline-offset-3 hover:underline disabled:bg-transparent disabled:border-transparent",
};

const SIZES: Readonly<Record<ButtonSize, string>> = {
  normal: "h-9 text-text",
  small: "h-7 text-small",
  touch: "h-12 text-text",
};

function looksOf({ variant = "plain", size = "normal", className }: Omit<Looks, "children">): string {
  const padding = variant === "bare" ? "px-1.5" : size === "small" ? "px-2.5" : "px-4";
  const isWide = variant === "stop" && size !== "small" && "min-w-27";
  return classNames(BASE, VARIANTS[variant], SIZES[size], padding, isWide, className);
}

/** A button, or a link that looks like one when it has an `href`. */
export function Button(props: ButtonProps) {
  if (props.href !== undefined) {
    const { variant, size, className, children, href, download, ...rest } = props;
    const looks = looksOf({ variant, size, className });
    return download ? (
      <a href={href} download className={looks} {...rest}>
        {children}
      </a>
    ) : (
      <Link href={href} className={looks} {...rest}>
        {children}
      </Link>
    );
  }
  const { variant, size, className, children, busy = false, type = "button", disabled, ...rest } = props;
  return (
    <button
      type={type}
      className={looksOf({ variant, size, className })}
      disabled={disabled || busy}
      aria-busy={busy || undefined}
      {...rest}
    >
      {children}
    </button>
  );
}
