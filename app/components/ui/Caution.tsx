import type { ReactNode } from "react";
import { useFetcher, useLocation, useRouteLoaderData } from "react-router";
import type { RootData } from "../root-data";
import { Button } from "./Button";
import { Icon } from "./Icon";

export interface CautionProps {
  /** Which caution: what is sent to `POST /cautions/dismiss` as `caution`, with `returnTo`. */
  id: string;
  /** False where it must always stand; for a visitor, whom nobody remembers, it always does. */
  dismissible?: boolean;
  children: ReactNode;
}

/** A short caution beside the thing it is about; put away once per person. */
export function Caution({ id, dismissible = true, children }: CautionProps) {
  const fetcher = useFetcher();
  const { pathname, search } = useLocation();
  const remembered = useRouteLoaderData<RootData>("root")?.person;
  if (fetcher.state !== "idle" || fetcher.data) return null;
  return (
    <aside className="caution" aria-label="Caution">
      <Icon name="warning" />
      <div className="caution-words">{children}</div>
      {dismissible && remembered && (
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
