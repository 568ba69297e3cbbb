import { skipToken, useQuery } from "@tanstack/react-query";
import { api } from "@/lib/client/api";
import { isApiError } from "@/lib/client/api-error";
import type { PreflightRequest } from "@/lib/schemas/run";

/** A finding of the bench counts for so long. */
const STALE_MS = 20_000;

/** The preflight of a choice: asked for at once, and again whenever it has become stale while the page is looked at. */
export function usePreflight(request: PreflightRequest | null, isPaused: boolean) {
  return useQuery({
    queryKey: ["preflight", request],
    queryFn: request ? ({ signal }) => api.preflight(request, signal) : skipToken,
    enabled: !isPaused,
    staleTime: STALE_MS,
    gcTime: STALE_MS,
    refetchInterval: (query) => (isApiError(query.state.error) && query.state.error.status === 403 ? false : STALE_MS),
    refetchOnWindowFocus: true,
  });
}
