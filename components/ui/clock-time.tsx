"use client";

import { useSyncExternalStore } from "react";

const WITH_SECONDS = new Intl.DateTimeFormat("en-GB", { hour: "2-digit", minute: "2-digit", second: "2-digit" });
const TO_THE_MINUTE = new Intl.DateTimeFormat("en-GB", { hour: "2-digit", minute: "2-digit" });

export interface ClockTimeProps {
  /** UTC milliseconds. */
  atMs: number;
  seconds?: boolean;
  className?: string;
}

const nothingChanges = () => () => undefined;

/** A time of day as this reader's clock shows it. The server's zone may differ, so it is set again once in the browser. */
export function ClockTime({ atMs, seconds = false, className }: ClockTimeProps) {
  const isInBrowser = useSyncExternalStore(
    nothingChanges,
    () => true,
    () => false,
  );
  return (
    <time
      key={isInBrowser ? "browser" : "server"}
      dateTime={new Date(atMs).toISOString()}
      suppressHydrationWarning
      className={className}
    >
      {(seconds ? WITH_SECONDS : TO_THE_MINUTE).format(atMs)}
    </time>
  );
}
