import type { ReactNode } from "react";
import { useFetcher, useLocation } from "react-router";
import { Button } from "./Button";
import { Icon } from "./Icon";

export interface CautionProps {
  /** Which caution: what is sent to `POST /cautions/dismiss` as `caution`, with `returnTo`. */
  id: string;
  /** False where there is nobody to remember it for, or where it must always stand. */
  dismissible?: boolean;
  children: ReactNode;
}

/** A short caution beside the thing it is about; put away once per person. */
export function Caution({ id, dismissible = true, children }: CautionProps) {
  const fetcher = useFetcher();
  const { pathname, search } = useLocation();
  if (fetcher.state !== "idle" || fetcher.data) return null;
  return (
    <aside className="caution" aria-label="Caution">
      <Icon name="warning" />
      <div className="caution-words">{children}</div>
      {dismissible && (
        <fetcher.Form method="post" action="/cautions/dismiss" className="no-print">
          <input type="hidden" name="caution" value={id} />
          <input type="hidden" name="returnTo" value={pathname + search} />
          <Button variant="quiet" size="small">
            Understood
          </Button>
        </fetcher.Form>
      )}
    </aside>
  );
}
