"use client";

import { Dialog as BaseDialog } from "@base-ui/react/dialog";
import type { ReactNode } from "react";

export interface DialogProps {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  title: ReactNode;
  /** What will happen, in a sentence. */
  description?: ReactNode;
  /** Buttons at the foot, the main one last. */
  actions: ReactNode;
  children?: ReactNode;
}

/** Says what will happen and takes what it needs. Escape and a press outside close it; focus returns to where it was. */
export function Dialog({ open, onOpenChange, title, description, actions, children }: DialogProps) {
  return (
    <BaseDialog.Root open={open} onOpenChange={(isOpen) => onOpenChange(isOpen)}>
      <BaseDialog.Portal>
        <BaseDialog.Backdrop className="fixed inset-0 z-40 bg-hatch-ink opacity-60" />
        <BaseDialog.Popup className="fixed top-1/2 left-1/2 z-50 grid max-h-[calc(100vh-2rem)] w-[min(32rem,calc(100vw-2rem))] -translate-x-1/2 -translate-y-1/2 gap-3 overflow-y-auto rounded border border-line-strong bg-panel p-5 text-ink">
          <BaseDialog.Title className="text-state font-semibold">{title}</BaseDialog.Title>
          {description && (
            <BaseDialog.Description className="text-text text-ink-2">{description}</BaseDialog.Description>
          )}
          {children}
          <div className="mt-1 flex flex-wrap justify-end gap-2">{actions}</div>
        </BaseDialog.Popup>
      </BaseDialog.Portal>
    </BaseDialog.Root>
  );
}
