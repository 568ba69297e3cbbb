import { useMutation } from "@tanstack/react-query";
import { useRouter } from "next/navigation";
import { useRef } from "react";
import { api } from "@/lib/client/api";
import { isApiError } from "@/lib/client/api-error";
import { randomId } from "@/lib/client/random-id";
import type { StartRun } from "@/lib/schemas/run";

export type StartOrder = Omit<StartRun, "requestId">;

/**
 * Starts a run and turns to its page. A send without an answer is repeated under the same id, by itself and at the
 * next press, so that one wish never starts two runs.
 */
export function useStartRun() {
  const router = useRouter();
  const requestId = useRef<string | null>(null);
  return useMutation({
    mutationFn: (order: StartOrder) => {
      requestId.current ??= randomId();
      return api.startRun({ ...order, requestId: requestId.current });
    },
    retry: (tries, error) => isUnanswered(error) && tries < 2,
    retryDelay: 700,
    onError: (error) => {
      if (!isUnanswered(error)) requestId.current = null;
    },
    onSuccess: ({ runId }) => router.push(`/runs/${runId}`),
  });
}

function isUnanswered(error: unknown): boolean {
  return isApiError(error) && error.isUnanswered;
}
