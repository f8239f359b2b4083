import { Link } from "react-router";
import { DateTime } from "~/components/ui/DateTime";
import type { DipPageData } from "../dip-page.server";

/** What the causes were reckoned from, and what could not take part because it is not said. */
export function NotJudged({ data }: { data: DipPageData }) {
  const { projectId, judgement } = data;
  const { antenna, notJudged, ripple, bench } = judgement;
  const page = `/projects/${projectId}/antenna`;
  return (
    <div className="grid gap-1 text-small max-w-[72ch]">
      <p className="soft">
        {antenna.kind === "described" && (
          <>
            Judged with{" "}
            <Link to={antenna.day ? `${page}?on=${antenna.day}` : page}>the antenna as it was that day</Link>
            {antenna.from && (
              <>
                {" "}
                (version {antenna.number}, from <DateTime at={antenna.from} dateOnly />)
              </>
            )}
            .{" "}
          </>
        )}
        {ripple
          ? `Ripple of the feedline: minima ${ripple} apart.`
          : "Ripple of the feedline is not judged: its length or its velocity factor is not said."}{" "}
        {bench
          ? bench.kinds.length > 0
            ? `The ${bench.kinds.join(", ")} of the bench “${bench.name}” were looked through for the same dip.`
            : `The bench “${bench.name}” has no sweeps of its own to look through.`
          : "No bench is said, so a dip of the bench can't be ruled out."}
      </p>
      {antenna.kind === "never" && (
        <p>
          The antenna is not described yet, so none of its parts was judged.{" "}
          <Link to={page}>Describe the antenna</Link>
        </p>
      )}
      {antenna.kind === "before" && antenna.describedFrom && (
        <p>
          The antenna is described from <DateTime at={antenna.describedFrom} dateOnly /> on, and this sweep is
          older: none of its parts was judged. <Link to={page}>The antenna</Link>
        </p>
      )}
      {notJudged.length > 0 && (
        <p>
          Not judged: {notJudged.map(({ name, reason }) => `${name} (${reason})`).join(", ")}.{" "}
          <Link to={page}>Say it on the antenna’s page</Link>
        </p>
      )}
    </div>
  );
}
