import { failureMessage, isApiError } from "@/lib/client/api-error";

/** Opens a page afresh: the new session counts for everything on it. */
export function enterSite(path: string): void {
  window.location.assign(path);
}

/** Why a person is not let in yet, in words. */
export function entranceFailure(error: unknown): string {
  if (isApiError(error) && error.isUnanswered) {
    return "The server can’t be reached. See that Stepwell is running and that this machine is on its network, then try again.";
  }
  return failureMessage(error);
}
