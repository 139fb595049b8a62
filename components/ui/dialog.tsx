"use client";

import { type MouseEvent, type ReactNode, useEffect, useId, useRef } from "react";
import { Button } from "./button";
import { cx } from "./class-names";

export type DialogProps = {
  open: boolean;
  onClose: () => void;
  title: ReactNode;
  children?: ReactNode;
  /** Buttons, the safe one first. The one marked data-safe gets the focus. */
  actions?: ReactNode;
  /** "sheet" rises from the foot of the phone's page. */
  place?: "middle" | "sheet";
  className?: string;
};

/** The browser's own modal dialog: it keeps the focus inside, closes on Escape and gives the focus back. */
export function Dialog({
  open,
  onClose,
  title,
  children,
  actions,
  place = "middle",
  className,
}: DialogProps) {
  const element = useRef<HTMLDialogElement>(null);
  const titleId = useId();

  useEffect(() => {
    const dialog = element.current;
    if (!dialog) return;
    if (open && !dialog.open) {
      dialog.showModal();
      dialog.querySelector<HTMLElement>("[data-safe]")?.focus();
    }
    if (!open && dialog.open) dialog.close();
  }, [open]);

  function closeOutside(event: MouseEvent<HTMLDialogElement>) {
    // The dialog's inside is one child that fills it, so a press on the element itself is a press on the backdrop.
    if (event.target === event.currentTarget) onClose();
  }

  return (
    // biome-ignore lint/a11y/useKeyWithClickEvents: Escape closes the dialog through its cancel event
    <dialog
      ref={element}
      aria-labelledby={titleId}
      onCancel={(event) => {
        event.preventDefault();
        onClose();
      }}
      onClose={() => open && onClose()}
      onClick={closeOutside}
      className={cx(
        "rounded bg-sheet p-0 text-ink shadow-float",
        place === "middle" && "m-auto w-[min(480px,calc(100vw-32px))]",
        place === "sheet" && "mx-0 mt-auto mb-0 w-full max-w-none rounded-b-none",
        className,
      )}
    >
      {open ? (
        <div
          className={cx(
            "px-6 py-5",
            place === "sheet" && "px-4! pb-[calc(20px+env(safe-area-inset-bottom))]",
          )}
        >
          <h2 id={titleId} className="text-19! leading-6!">
            {title}
          </h2>
          {children}
          {actions ? <div className="mt-5 flex flex-wrap justify-end gap-2">{actions}</div> : null}
        </div>
      ) : null}
    </dialog>
  );
}

/** Asked only before money moves or something is deleted for good; everything else is done and can be undone. */
export function ConfirmDialog({
  open,
  title,
  children,
  keepLabel,
  confirmLabel,
  busy,
  onKeep,
  onConfirm,
}: {
  open: boolean;
  title: ReactNode;
  children: ReactNode;
  /** Says what stays as it is: "Keep the payment". */
  keepLabel: string;
  /** Says what the button does: "Refund €400.00". */
  confirmLabel: string;
  busy?: boolean;
  onKeep: () => void;
  onConfirm: () => void;
}) {
  return (
    <Dialog
      open={open}
      onClose={onKeep}
      title={title}
      actions={
        <>
          <Button data-safe="" onClick={onKeep}>
            {keepLabel}
          </Button>
          <Button kind="danger" busy={busy} onClick={onConfirm}>
            {confirmLabel}
          </Button>
        </>
      }
    >
      <div className="mt-2">{children}</div>
    </Dialog>
  );
}
