import { useRef, type MouseEvent, type PointerEvent } from "react";
import type { MatrixCell } from "@/lib/schemas/recipe";

type ChangeCells = (cells: readonly MatrixCell[], isIncluded: boolean) => void;

/**
 * Switching of cells: a press with the mouse switches and paints on while it is held; a tap, Space or Enter switches
 * one cell. A touch that scrolls the page switches nothing.
 */
export function usePainting(onChange: ChangeCells | undefined) {
  const painted = useRef<boolean | null>(null);
  const pointer = useRef("");
  return (cell: MatrixCell, isIncluded: boolean) => ({
    onPointerDown: (event: PointerEvent) => {
      pointer.current = event.pointerType;
      if (event.pointerType !== "mouse" || event.button !== 0) return;
      painted.current = !isIncluded;
      onChange?.([cell], !isIncluded);
    },
    onPointerEnter: (event: PointerEvent) => {
      if (event.buttons === 1 && painted.current !== null) onChange?.([cell], painted.current);
    },
    onPointerUp: () => {
      painted.current = null;
    },
    onClick: (event: MouseEvent) => {
      const isByMouse = event.detail !== 0 && pointer.current === "mouse";
      if (!isByMouse) onChange?.([cell], !isIncluded);
    },
  });
}
