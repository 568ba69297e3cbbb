import { io, type Socket } from "socket.io-client";
import type { ClientToServerEvents, ServerToClientEvents } from "@/lib/schemas/socket";
import { createContactStore, STALE_AFTER_MS, type ContactStore } from "./contact";

export type LiveSocket = Socket<ServerToClientEvents, ClientToServerEvents>;

/** The page's one connection: its socket, whether the server is heard, and the news that the page woke up. */
export interface LiveLink {
  socket: LiveSocket;
  contact: ContactStore;
  /** Calls back when the page was asleep, hidden or off the network and is back. Returns a function that ends it. */
  onWake(listener: () => void): () => void;
}

/** Silence after which a connection that claims to be up is made anew: after a sleep it may be dead without knowing. */
const DOUBTFUL_AFTER_MS = 2500;

let shared: LiveLink | null = null;

/** The one connection that all live parts of the page share; made at the first call, in the browser only. */
export function getLiveLink(): LiveLink {
  shared ??= openLink();
  return shared;
}

function openLink(): LiveLink {
  const socket: LiveSocket = io({
    path: "/socket.io",
    transports: ["websocket", "polling"],
    reconnectionDelay: 250,
    reconnectionDelayMax: 2000,
    timeout: 5000,
  });
  const contact = createContactStore(Date.now());
  keepContact(socket, contact);
  const waking = watchForWaking(socket, contact);
  return { socket, contact, onWake: (listener) => (waking.add(listener), () => void waking.delete(listener)) };
}

function keepContact(socket: LiveSocket, contact: ContactStore): void {
  socket.on("connect", () => contact.getState().heard(Date.now()));
  socket.onAny(() => contact.getState().heard(Date.now()));
  socket.on("connect_error", (error) => {
    // An inactive socket was turned away by the server; otherwise the network failed and the socket tries again.
    if (!socket.active) contact.getState().refused(error.message);
  });
  socket.on("disconnect", (reason) => {
    if (reason === "io server disconnect") contact.getState().refused("The session has ended. Sign in again.");
  });
  setInterval(() => {
    contact.getState().check(Date.now());
    renewWhenSilent(socket, contact, STALE_AFTER_MS);
  }, 1000);
}

function watchForWaking(socket: LiveSocket, contact: ContactStore): Set<() => void> {
  const listeners = new Set<() => void>();
  const wake = () => {
    if (document.visibilityState === "hidden") return;
    contact.getState().check(Date.now());
    renewWhenSilent(socket, contact, DOUBTFUL_AFTER_MS);
    for (const listener of listeners) listener();
  };
  document.addEventListener("visibilitychange", wake);
  for (const event of ["pageshow", "online"]) window.addEventListener(event, wake);
  return listeners;
}

/** Every follower asks again on the `connect` that follows. */
function renewWhenSilent(socket: LiveSocket, contact: ContactStore, silenceMs: number): void {
  const { lastHeardMs, refusal } = contact.getState();
  if (refusal || Date.now() - lastHeardMs <= silenceMs) return;
  if (socket.connected) socket.disconnect();
  if (!socket.active || !socket.connected) socket.connect();
}
