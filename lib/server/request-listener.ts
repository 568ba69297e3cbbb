import type { IncomingMessage, RequestListener, ServerResponse } from "node:http";
import { isAllowedHost } from "./origin";

type NextHandler = (request: IncomingMessage, response: ServerResponse) => Promise<void>;

export interface ListenerDependencies {
  handle: NextHandler;
  allowedHosts: readonly string[];
  onError: (message: string, error: unknown) => void;
}

const SECURITY_HEADERS: ReadonlyArray<readonly [string, string]> = [
  ["X-Content-Type-Options", "nosniff"],
  ["Referrer-Policy", "same-origin"],
  ["X-Frame-Options", "DENY"],
  ["Cross-Origin-Opener-Policy", "same-origin"],
];

/** Hands requests to Next, with the path and the peer's address in headers that no client can forge. */
export function requestListener({ handle, allowedHosts, onError }: ListenerDependencies): RequestListener {
  return (request, response) => {
    if (!isAllowedHost(request.headers.host, allowedHosts)) {
      response.writeHead(421, { "Content-Type": "text/plain" }).end("This host name is not served here.\n");
      return;
    }
    request.headers["x-stepwell-path"] = request.url ?? "/";
    request.headers["x-stepwell-address"] = request.socket.remoteAddress ?? "unknown";
    for (const [name, value] of SECURITY_HEADERS) response.setHeader(name, value);
    handle(request, response).catch((error: unknown) => {
      onError("a request could not be served", error);
      if (!response.headersSent) response.writeHead(500).end();
    });
  };
}
