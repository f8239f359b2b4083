import { type ReactNode, useRef } from "react";
import { Button, type ButtonProps } from "./Button";
import { useHydrated } from "./hydrated";

export interface DialogProps {
  /** The words on the button that opens it. */
  label: string;
  variant?: ButtonProps["variant"];
  size?: ButtonProps["size"];
  icon?: ButtonProps["icon"];
  title: string;
  /** Its own action belongs inside, as a form. */
  children: ReactNode;
  /** The words on the button that leaves everything as it is. */
  cancelLabel?: string;
}

/** Asks once, in a native dialog. Without JavaScript the same content unfolds under its label. */
export function Dialog({ label, variant = "quiet", size, icon, title, children, cancelLabel }: DialogProps) {
  const dialog = useRef<HTMLDialogElement>(null);
  const hydrated = useHydrated();
  if (!hydrated) {
    return (
      <details className="dialog-unfolded">
        <summary className={`button button-${variant} ${size === "small" ? "button-small" : ""}`}>
          {label}
        </summary>
        <div className="panel">
          <h2>{title}</h2>
          {children}
        </div>
      </details>
    );
  }
  return (
    <>
      <Button type="button" {...{ variant, size, icon }} onClick={() => dialog.current?.showModal()}>
        {label}
      </Button>
      <dialog ref={dialog} className="dialog" aria-label={title}>
        <h2>{title}</h2>
        {children}
        <form method="dialog" className="dialog-cancel">
          <Button variant="quiet">{cancelLabel ?? "Leave it as it is"}</Button>
        </form>
      </dialog>
    </>
  );
}
