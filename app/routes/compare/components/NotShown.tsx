import { Link } from "react-router";
import { MOST_COMPARED } from "../compare.schema";
import type { ComparePageData } from "../compare-page.server";

/** What the address asks for and this page can't show, and why. */
export function NotShown({ data: { missing, unread, leftOut, noAddress } }: { data: ComparePageData }) {
  return (
    <>
      {missing > 0 && (
        <p className="text-clay max-w-[72ch]">
          {missing === 1 ? "One of the sweeps is" : `${missing} of the sweeps are`} not here: deleted, hidden
          from you, or never there. The others are shown.
        </p>
      )}
      {unread.map(({ publicId, title, project }) => (
        <p key={publicId} className="text-clay max-w-[72ch]">
          “{title}” has no numbers yet:{" "}
          <Link to={`/projects/${project}/sweeps/${publicId}/reading`}>see its reading</Link>.
        </p>
      ))}
      {leftOut > 0 && (
        <p className="text-clay">At most {MOST_COMPARED} sweeps are compared; the rest were left out.</p>
      )}
      {noAddress && (
        <p role="alert" className="text-alarm max-w-[72ch] break-words">
          “{noAddress}” is no address of a sweep. Nothing was added: open the sweep and copy its address from
          there.
        </p>
      )}
    </>
  );
}
