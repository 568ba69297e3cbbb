import type { ActivePoint } from "@/lib/journal/run-state";
import type { Judgement } from "@/lib/schemas/run-event";
import { Sliver, sliverProps } from "@/components/marks/sliver";
import { MarkShape, VERDICT_INKS, VERDICT_WORDS, type PointVerdict } from "@/components/marks/verdict";
import { classNames } from "@/components/ui/class-names";
import { errorWords, judgedWords, PHASE_WORDS, placeWords } from "./cell-words";
import type { MatrixCell } from "./matrix-cells";

const TINTS: Readonly<Record<PointVerdict, string>> = {
  inside: "border-transparent bg-moss-tint",
  doubtful: "border-transparent bg-ochre-tint",
  outside: "border-brick bg-brick-tint",
  unsettled: "border-transparent bg-plum-tint",
  "not-stated": "border-line bg-sunken",
  skipped: "border-line bg-sunken",
};

/** Border and ground of a cell. */
export function cellLooks(cell: MatrixCell): string {
  switch (cell.kind) {
    case "judged":
      return TINTS[cell.judgement.verdict];
    case "skipped":
      return TINTS.skipped;
    case "present":
      return "border-water bg-panel outline-1 -outline-offset-2 outline-water";
    case "open":
      return "border-line bg-panel";
    default:
      return "excluded border-line";
  }
}

/** What the pointer resting on a cell says. */
export function cellTitle(cell: MatrixCell): string {
  switch (cell.kind) {
    case "judged":
      return judgedWords(cell.point, cell.judgement);
    case "present":
      return `${placeWords(cell.point)}: ${PHASE_WORDS[cell.active.phase]}`;
    case "open":
      return `${placeWords(cell.point)}: to come`;
    case "skipped":
      return `${placeWords(cell.point)}: skipped`;
    case "excluded":
      return `not run: ${cell.reason}`;
    case "absent":
      return "not in the recipe";
  }
}

export function CellContent({ cell }: { cell: MatrixCell }) {
  switch (cell.kind) {
    case "judged":
      return <JudgedContent judgement={cell.judgement} />;
    case "present":
      return <PresentContent active={cell.active} />;
    case "skipped":
      return <MarkedContent verdict="skipped" text="skipped" />;
    default:
      return <span className="sr-only">{cell.kind === "open" ? "to come" : cellTitle(cell)}</span>;
  }
}

/** Inside and outside are told by their sliver; the other verdicts carry their mark as well. */
function JudgedContent({ judgement }: { judgement: Judgement }) {
  const { verdict } = judgement;
  const hasSliver = judgement.limitOhms !== null && judgement.errorOhms !== null;
  const isMarked = verdict !== "inside" && verdict !== "outside";
  return (
    <>
      {hasSliver ? <Sliver {...sliverProps(judgement)} /> : <Mark verdict={verdict} />}
      <span className="flex items-center gap-1">
        {isMarked && hasSliver && <Mark verdict={verdict} />}
        <b className={classNames(verdict === "inside" ? "font-medium text-ink" : VERDICT_INKS[verdict])}>
          {errorWords(judgement)}
        </b>
        <span className="sr-only">
          {judgement.errorPercent === null ? "" : " %"}, {VERDICT_WORDS[verdict]}
        </span>
      </span>
    </>
  );
}

function MarkedContent({ verdict, text }: { verdict: PointVerdict; text: string }) {
  return (
    <>
      <Mark verdict={verdict} />
      <span className="text-ink-2">{text}</span>
    </>
  );
}

function Mark({ verdict }: { verdict: PointVerdict }) {
  return (
    <svg viewBox="0 0 12 12" aria-hidden="true" className={classNames("size-3 flex-none", VERDICT_INKS[verdict])}>
      <MarkShape verdict={verdict} />
    </svg>
  );
}

/** Fills from below as the point comes to rest. */
function PresentContent({ active }: { active: ActivePoint }) {
  const percent = active.phase === "settling" ? Math.round((active.assessment?.progress ?? 0) * 100) : null;
  const fill = percent ?? (active.phase === "averaging" ? 100 : 0);
  return (
    <>
      <span
        aria-hidden="true"
        className="absolute inset-x-0 bottom-0 -z-10 bg-water-tint transition-[height] duration-200"
        style={{ height: `${fill}%` }}
      />
      <span>{PHASE_WORDS[active.phase]}</span>
      {percent !== null && <span className="text-ink-2">{percent} %</span>}
    </>
  );
}
