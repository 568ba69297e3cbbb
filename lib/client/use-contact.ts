"use client";

import { useSyncExternalStore } from "react";
import type { Contact } from "./contact";
import { getLiveLink } from "./socket";

const UNKNOWN: Contact = { lastHeardMs: 0, staleSinceMs: null, refusal: null };

/** Whether the server is heard; assumed while the server renders. */
export function useContact(): Contact {
  return useSyncExternalStore(
    (onChange) => getLiveLink().contact.subscribe(onChange),
    () => getLiveLink().contact.getState(),
    () => UNKNOWN,
  );
}
