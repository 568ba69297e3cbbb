"use client";

import type { ReactNode } from "react";
import { Button } from "@/components/ui/button";
import { Panel } from "@/components/ui/panel";
import { failureMessage, isApiError } from "@/lib/client/api-error";
import { useNow } from "@/lib/client/use-now";
import type { Preflight } from "@/lib/schemas/run";
import { formatDuration } from "@/lib/units/format";
import { CheckRow } from "./check-row";

interface PreflightPanelProps {
  benchName: string;
  isChosen: boolean;
  preflight: Preflight | undefined;
  /** When it was made, by this machine's clock. */
  madeAtMs: number;
  isChecking: boolean;
  error: Error | null;
  onAgain: () => void;
  /** The start button with what is missing. */
  children: ReactNode;
}

/** What the bench says about the choice: each check with its finding, and what to do where it is not ready. */
export function PreflightPanel(props: PreflightPanelProps) {
  const { preflight, error, children } = props;
  return (
    <Panel title="Preflight" right={<PreflightAge {...props} />} padding="flush">
      {error ? (
        <PreflightFailure {...props} error={error} />
      ) : preflight ? (
        <ul aria-label="Checks">
          {preflight.checks.map((check) => (
            <CheckRow key={check.id} check={check} />
          ))}
        </ul>
      ) : (
        <PreflightBefore {...props} />
      )}
      <div className="p-3.5">{children}</div>
    </Panel>
  );
}

function PreflightAge({ preflight, madeAtMs, isChecking, error }: PreflightPanelProps) {
  const nowMs = useNow(madeAtMs);
  if (isChecking) return "checking";
  return preflight && !error ? `checked ${formatDuration(Math.max(0, nowMs - madeAtMs) / 1000)} ago` : null;
}

function PreflightBefore({ isChosen, benchName }: PreflightPanelProps) {
  return (
    <p aria-busy={isChosen} className="border-b border-line px-3.5 py-4 text-ink-2">
      {isChosen
        ? `Asking the devices of ${benchName}, and proving that its output is off.`
        : "The bench is checked as soon as the unit and the recipe are chosen."}
    </p>
  );
}

function PreflightFailure({ error, isChecking, onAgain }: PreflightPanelProps & { error: Error }) {
  const isBusy = isApiError(error) && error.code === "bench-busy";
  return (
    <div role="alert" className="grid gap-2.5 border-b border-line px-3.5 py-4">
      <p>
        <b className="text-brick">{isBusy ? "The bench is taken." : "The preflight was not made."}</b>{" "}
        {failureMessage(error)}
      </p>
      <p className="flex gap-2">
        <Button size="small" onClick={onAgain} busy={isChecking}>
          Check again
        </Button>
        {isBusy && (
          <Button size="small" href="/benches">
            See the benches
          </Button>
        )}
      </p>
    </div>
  );
}
