import type { StateSentence } from "@/lib/journal/state-sentence";
import { classNames } from "@/components/ui/class-names";

const TONES: Readonly<Record<StateSentence["tone"], string>> = {
  water: "text-water",
  ochre: "text-ochre",
  brick: "text-brick",
  plum: "text-plum",
  moss: "text-moss",
  plain: "text-ink",
};

/** What a run does, as a sentence with its first word in colour. */
export function StateLine({ sentence, className }: { sentence: StateSentence; className?: string }) {
  return (
    <p className={classNames("text-state", className)}>
      <b className={classNames("mr-2", TONES[sentence.tone])}>{sentence.lead}</b>
      {sentence.rest}
    </p>
  );
}
