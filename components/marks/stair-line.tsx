import type { KeyboardEvent, PointerEvent } from "react";
import type { StairGroup, StairStep } from "@/lib/schemas/run";
import { formatTestVolts } from "@/lib/units/format";
import { classNames } from "@/components/ui/class-names";
import { groupOf, placeAfterKey, stairLength, type StairPlace } from "./stair-place";

export type StairSize = "large" | "band" | "small";

export interface StairLineProps {
  groups: readonly StairGroup[];
  size: StairSize;
  /** Replay: where the moment shown lies. */
  cursor?: StairPlace | null;
  /** Replay: makes the line a slider. */
  onScrub?: (place: StairPlace) => void;
  /** Replay: the moment in words, for assistive technology. */
  cursorText?: string;
  className?: string;
}

interface Measures {
  step: number;
  rise: number;
  tread: number;
  drop: number;
  /** Greatest descent of all groups together. */
  descent: number;
  groupGap: number;
  stepGap: number;
}

const SIZES: Readonly<Record<StairSize, Measures>> = {
  large: { step: 11, rise: 3, tread: 3, drop: 6, descent: 36, groupGap: 11, stepGap: 2 },
  band: { step: 11, rise: 3, tread: 3, drop: 6, descent: 24, groupGap: 10, stepGap: 2 },
  small: { step: 6, rise: 2, tread: 2, drop: 2, descent: 10, groupGap: 4, stepGap: 1 },
};

/** Above this many groups the gaps between them would eat the steps. */
const MANY_GROUPS = 16;

const FILLS: Readonly<Record<StairStep, string>> = {
  inside: "fill-moss",
  doubtful: "fill-ochre",
  outside: "fill-brick",
  unsettled: "fill-plum",
  "not-stated": "fill-line-strong",
  skipped: "fill-none stroke-line-strong",
  present: "fill-water",
  open: "fill-line",
};

/**
 * One step per point, grouped by test voltage, each group lower than the one before, down to a water line.
 * With `onScrub` it is the replay's scrubber: a slider by pointer and by keys.
 */
export function StairLine(props: StairLineProps) {
  const { groups, size, cursor, onScrub, className } = props;
  const measures = SIZES[size];
  const gap = groups.length > MANY_GROUPS ? 1 : measures.groupGap;
  const drop = Math.min(measures.drop, measures.descent / Math.max(1, groups.length - 1));
  const waterY = 2 * measures.rise + measures.step + drop * Math.max(0, groups.length - 1);
  return (
    <div
      className={classNames("relative", onScrub && "cursor-ew-resize touch-none", className)}
      {...(onScrub ? sliderProps(props, onScrub) : { role: "img", "aria-label": describeStairs(groups) })}
    >
      <div
        className="grid border-b-[1.5px] border-water"
        style={{ gridTemplateColumns: columnsOf(groups), columnGap: gap, height: waterY + 1.5 }}
      >
        {groups.map((group, index) => (
          <GroupSteps key={index} group={group} measures={measures} top={index * drop} height={waterY} />
        ))}
      </div>
      {size !== "small" && <GroupLabels groups={groups} gap={gap} />}
      {cursor && <Cursor groups={groups} gap={gap} place={cursor} height={waterY} />}
    </div>
  );
}

function columnsOf(groups: readonly StairGroup[]): string {
  return groups.map((group) => `minmax(0, ${group.steps.length}fr)`).join(" ");
}

function GroupSteps({
  group,
  measures,
  top,
  height,
}: {
  group: StairGroup;
  measures: Measures;
  top: number;
  height: number;
}) {
  const pitch = 100 / group.steps.length;
  return (
    <svg aria-hidden="true" width="100%" height={height} className="block overflow-visible">
      {group.steps.map((step, index) => (
        <rect
          key={index}
          x={`${(index * pitch).toFixed(3)}%`}
          style={{ width: `max(1px, calc(${pitch.toFixed(3)}% - ${measures.stepGap}px))` }}
          {...stepBox(step, measures, top)}
          data-step={step}
          className={classNames(FILLS[step], step === "present" && "opacity-85")}
        />
      ))}
    </svg>
  );
}

/** Bottom edge shared by all steps of a group: a step to come is a tread, an outside step stands taller. */
function stepBox(step: StairStep, { step: full, rise, tread }: Measures, top: number): { y: number; height: number } {
  const bottom = top + rise + full;
  const height = step === "open" ? tread : step === "outside" ? full + rise : step === "skipped" ? tread + 2 : full;
  return { y: bottom - height, height };
}

/** A label that finds no room under its group wraps out of sight whole, so that `1000 V` never reads as `100`. */
function GroupLabels({ groups, gap }: { groups: readonly StairGroup[]; gap: number }) {
  return (
    <div
      aria-hidden="true"
      className="grid font-mono text-[0.71875rem] text-ink-2"
      style={{ gridTemplateColumns: columnsOf(groups), columnGap: gap }}
    >
      {groups.map((group, index) => (
        <span key={index} className="mt-0.5 flex h-4 flex-wrap overflow-hidden leading-4">
          <span className="h-4 w-0" />
          <span className="whitespace-nowrap">{formatTestVolts(group.testVolts)}</span>
        </span>
      ))}
    </div>
  );
}

function Cursor({
  groups,
  gap,
  place,
  height,
}: {
  groups: readonly StairGroup[];
  gap: number;
  place: StairPlace;
  height: number;
}) {
  const { group } = groupOf(groups, place.point);
  const share = (place.point + place.fraction) / Math.max(1, stairLength(groups));
  const left = `calc((100% - ${(groups.length - 1) * gap}px) * ${share.toFixed(5)} + ${group * gap}px)`;
  return (
    <svg
      aria-hidden="true"
      className="pointer-events-none absolute -top-2.5 w-3.5 -translate-x-1/2 overflow-visible text-ink"
      style={{ left, height: height + 18 }}
    >
      <path d="M0 0h14L7 10z" fill="currentColor" />
      <path d={`M7 8V${height + 18}`} stroke="currentColor" strokeWidth="2" />
    </svg>
  );
}

function describeStairs(groups: readonly StairGroup[]): string {
  const count = (step: StairStep) => groups.flatMap((group) => group.steps).filter((each) => each === step).length;
  const length = stairLength(groups);
  const done = length - count("open") - count("present");
  const judged = (["inside", "doubtful", "outside", "unsettled", "skipped"] as const)
    .filter((step) => count(step) > 0)
    .map((step) => `${count(step)} ${step}`);
  return [`${done} of ${length} points done`, ...judged].join(", ");
}

function sliderProps({ groups, cursor, cursorText }: StairLineProps, onScrub: (place: StairPlace) => void) {
  const place = cursor ?? { point: 0, fraction: 0 };
  const scrubTo = (event: PointerEvent<HTMLElement>) => onScrub(placeUnder(event, groups));
  return {
    role: "slider",
    tabIndex: 0,
    "aria-label": "Moment of the run, by point",
    "aria-valuemin": 1,
    "aria-valuemax": stairLength(groups),
    "aria-valuenow": place.point + 1,
    "aria-valuetext": cursorText ?? `point ${place.point + 1} of ${stairLength(groups)}`,
    onKeyDown: (event: KeyboardEvent) => {
      const target = placeAfterKey(event.key, place, groups);
      if (!target) return;
      event.preventDefault();
      onScrub(target);
    },
    onPointerDown: (event: PointerEvent<HTMLElement>) => {
      event.currentTarget.setPointerCapture(event.pointerId);
      scrubTo(event);
    },
    onPointerMove: (event: PointerEvent<HTMLElement>) => {
      if (event.currentTarget.hasPointerCapture(event.pointerId)) scrubTo(event);
    },
  };
}

/** The point under the pointer: the line's columns share its width by their number of points. */
function placeUnder(event: PointerEvent<HTMLElement>, groups: readonly StairGroup[]): StairPlace {
  const grid = event.currentTarget.firstElementChild!;
  let first = 0;
  for (const [index, group] of groups.entries()) {
    const box = grid.children[index]!.getBoundingClientRect();
    const isLast = index === groups.length - 1;
    if (event.clientX < box.right || isLast) {
      const position = Math.min(1, Math.max(0, (event.clientX - box.left) / box.width)) * group.steps.length;
      const within = Math.min(group.steps.length - 1, Math.floor(position));
      return { point: first + within, fraction: Math.min(1, position - within) };
    }
    first += group.steps.length;
  }
  return { point: 0, fraction: 0 };
}
