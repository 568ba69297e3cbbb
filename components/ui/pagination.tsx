import { Button } from "./button";

interface PaginationProps {
  page: number;
  pages: number;
  /** What is counted, in words: `Runs 21 to 40 of 213`. */
  summary: string;
  hrefFor?: (page: number) => string;
  onPage?: (page: number) => void;
}

/** Earlier and later pages, by address or in place. */
export function Pagination({ page, pages, summary, hrefFor, onPage }: PaginationProps) {
  return (
    <nav aria-label="Pages" className="flex flex-wrap items-center gap-2 px-3.5 py-2.5">
      <span className="mr-auto text-small text-ink-2 tabular">{summary}</span>
      <Step label="Before" target={page - 1} isOpen={page > 1} hrefFor={hrefFor} onPage={onPage} />
      <span className="text-small tabular">
        Page {page} of {Math.max(1, pages)}
      </span>
      <Step label="Next" target={page + 1} isOpen={page < pages} hrefFor={hrefFor} onPage={onPage} />
    </nav>
  );
}

interface StepProps extends Pick<PaginationProps, "hrefFor" | "onPage"> {
  label: string;
  target: number;
  isOpen: boolean;
}

function Step({ label, target, isOpen, hrefFor, onPage }: StepProps) {
  return isOpen && hrefFor ? (
    <Button size="small" href={hrefFor(target)}>
      {label}
    </Button>
  ) : (
    <Button size="small" disabled={!isOpen} onClick={onPage && (() => onPage(target))}>
      {label}
    </Button>
  );
}
