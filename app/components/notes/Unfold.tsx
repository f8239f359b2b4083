import { type ReactNode, useState } from "react";
import { useHydrated } from "~/components/ui/hydrated";

export interface UnfoldProps {
  label: string;
  /** For those who hear it: what it is about. */
  about: string;
  /** What stands inside while there are no scripts. */
  bare: ReactNode;
  /** What stands inside, drawn only while it is open; called with what closes it. */
  children: (close: () => void) => ReactNode;
}

/** Something to do that unfolds in place; opens without scripts. */
export function Unfold({ label, about, bare, children }: UnfoldProps) {
  const hydrated = useHydrated();
  const [open, setOpen] = useState(false);
  return (
    <details
      open={open}
      onToggle={(event) => setOpen(event.currentTarget.open)}
      className="min-w-0 open:basis-full"
    >
      <summary className="note-action">
        {label}
        <span className="sr-only"> {about}</span>
      </summary>
      <div className="pt-2">{hydrated ? open && children(() => setOpen(false)) : bare}</div>
    </details>
  );
}
