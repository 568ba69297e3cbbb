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

const TURNED_AWAY_PAUSE_MS = 2000;
const SESSION_ENDED = "This session has ended. Load the page again to sign in.";

let shared: LiveLink | null = null;

/** The one connection that all live parts of the page share; made at the first call, in the browser only. */
export function getLiveLink(): LiveLink {
  shared ??= openLink();
  return shared;
}

/** For a part of the page that begins to follow: a connection that was refused earlier is tried again. */
export function joinLiveLink(): LiveLink {
  const link = getLiveLink();
  if (!link.socket.active) link.socket.connect();
  return link;
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
    // While active, the socket tries again by itself; an inactive one was turned away by the server.
    if (socket.active) return;
    if (error.message === "unauthenticated") contact.getState().refused(SESSION_ENDED);
    else setTimeout(() => socket.connect(), TURNED_AWAY_PAUSE_MS);
  });
  socket.on("disconnect", (reason) => {
    if (reason === "io server disconnect") contact.getState().refused(SESSION_ENDED);
  });
  setInterval(() => {
    contact.getState().check(Date.now());
    if (socket.connected && isSilent(contact, STALE_AFTER_MS)) renew(socket);
  }, 1000);
}

function watchForWaking(socket: LiveSocket, contact: ContactStore): Set<() => void> {
  const listeners = new Set<() => void>();
  const wake = () => {
    if (document.visibilityState === "hidden") return;
    contact.getState().check(Date.now());
    if (isSilent(contact, DOUBTFUL_AFTER_MS)) renew(socket);
    else for (const listener of listeners) listener();
  };
  document.addEventListener("visibilitychange", wake);
  for (const event of ["pageshow", "online"]) window.addEventListener(event, wake);
  return listeners;
}

function isSilent(contact: ContactStore, forMs: number): boolean {
  return Date.now() - contact.getState().lastHeardMs > forMs;
}

/** Gives the connection up and makes it anew at once, whatever pause the socket was in. Followers ask again on `connect`. */
function renew(socket: LiveSocket): void {
  socket.disconnect().connect();
}
