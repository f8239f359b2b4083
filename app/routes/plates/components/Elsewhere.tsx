import { DateTime } from "~/components/ui/DateTime";
import type { PlatePageData } from "../plate-page.server";

/** That this is a copy, and of what: the address that is cited is the one it was frozen at. */
export function Elsewhere({ plate }: { plate: PlatePageData }) {
  const { elsewhere } = plate;
  if (!elsewhere) return null;
  const { address, otherSite, at } = elsewhere;
  return (
    <aside className="panel border-l-3 border-l-clay grid gap-1" aria-label="Where it was frozen">
      <p className="break-words">
        Frozen at{" "}
        {/^https?:/.test(address) ? <a href={address}>{address}</a> : <span className="hash">{address}</span>}
        {otherSite && " in another Swale"}
        {at ? (
          <>
            ; this copy was taken in from a bundle on <DateTime at={at} dateOnly />.
          </>
        ) : (
          "; this page is a copy at another address."
        )}
      </p>
      <p className="text-small soft">It is cited by the address it was frozen at.</p>
    </aside>
  );
}
