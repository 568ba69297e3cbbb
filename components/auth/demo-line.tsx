import { Fragment } from "react";
import { DEMO_PASSWORD, type DemoAccount } from "./demo-accounts";

interface DemoLineProps {
  accounts: readonly DemoAccount[];
  onChoose: (email: string) => void;
}

/** Who may be played in the demo laboratory; a press on a name fills in the address. */
export function DemoLine({ accounts, onChoose }: DemoLineProps) {
  return (
    <div className="border-t border-line pt-3 text-label text-ink-2">
      <p>
        Demo laboratory. Password for everyone: <span className="font-mono text-ink">{DEMO_PASSWORD}</span>
      </p>
      <p className="max-sm:mt-1 max-sm:leading-8">
        {accounts.map(({ role, shortName, email }, index) => (
          <Fragment key={email}>
            {index > 0 && <span aria-hidden="true"> · </span>}
            <span className="whitespace-nowrap">
              {role}{" "}
              <button
                type="button"
                onClick={() => onChoose(email)}
                className="text-water underline underline-offset-3 max-sm:py-1"
              >
                {shortName}
              </button>
            </span>
          </Fragment>
        ))}
      </p>
    </div>
  );
}
