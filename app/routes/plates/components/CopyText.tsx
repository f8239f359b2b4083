import { useEffect, useId, useState } from "react";
import { Button } from "~/components/ui/Button";
import { useHydrated } from "~/components/ui/hydrated";

/** A text to take elsewhere: to be selected by hand, and with scripts by a press. */
export function CopyText({ label, text }: { label: string; text: string }) {
  const id = useId();
  const hydrated = useHydrated();
  const [said, setSaid] = useState("");
  useEffect(() => {
    if (!said) return;
    const timer = setTimeout(() => setSaid(""), SAID_MS);
    return () => clearTimeout(timer);
  }, [said]);
  const copy = () =>
    navigator.clipboard.writeText(text).then(
      () => setSaid("Copied"),
      () => setSaid("It could not be copied: select the text instead."),
    );
  return (
    <div className="copy-text">
      <div className="flex flex-wrap items-center gap-x-3 gap-y-1 justify-between">
        <h4 id={id}>{label}</h4>
        <span className="flex items-center gap-2 text-small">
          <span role="status">{said}</span>
          {hydrated && (
            <Button
              type="button"
              variant="quiet"
              size="small"
              onClick={copy}
              aria-label={`Copy: ${label}`}
              className="no-print"
            >
              Copy
            </Button>
          )}
        </span>
      </div>
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: a box that scrolls must be reachable by keyboard */}
      <section aria-labelledby={id} tabIndex={0}>
        <pre>{text}</pre>
      </section>
    </div>
  );
}

const SAID_MS = 4000;
