import { VerdictWord, VERDICT_INKS } from "@/components/marks/verdict";
import type { PreflightCheck } from "@/lib/schemas/run";

const looks = {
  ready: { verdict: "inside", word: "Ready" },
  look: { verdict: "doubtful", word: "Look" },
  blocked: { verdict: "outside", word: "Blocked" },
} as const;

/** One line of the preflight: state, what was checked, what was found, and the cure where there is something to do. */
export function CheckRow({ check }: { check: PreflightCheck }) {
  const { verdict, word } = looks[check.state];
  return (
    <li className="grid min-h-12 grid-cols-[112px_1fr] items-center border-b border-line px-3.5 py-1.5 max-sm:grid-cols-[92px_1fr]">
      <VerdictWord verdict={verdict}>{word}</VerdictWord>
      <div className="min-w-0">
        <b className="text-[0.875rem]">{check.title}</b>
        <p className="text-label wrap-anywhere text-ink-2">{check.finding}</p>
        {check.cure && <p className={`text-label ${VERDICT_INKS[verdict]}`}>{check.cure}</p>}
      </div>
    </li>
  );
}
