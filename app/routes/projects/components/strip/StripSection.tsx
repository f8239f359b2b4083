import { useMemo, useState } from "react";
import { Link, useNavigate, useNavigation } from "react-router";
import { frequencyScale } from "~/charts/axis";
import type { FrequencyRange } from "~/charts/ranges";
import { StripDrag } from "~/charts/StripDrag";
import { StripMap } from "~/charts/StripMap";
import { LinkButton } from "~/components/ui/Button";
import { EmptyState } from "~/components/ui/EmptyState";
import type { ProjectPageData } from "../../project-page.server.ts";
import { StripBar } from "./StripBar.tsx";
import { stripSearch } from "./strip.schema.ts";

/** The story's map: every sweep, what was done between them, and where each dip went. */
export function StripSection({ data }: { data: ProjectPageData }) {
  const { map, project, may, counts, unread } = data;
  const base = `/projects/${project.publicId}`;
  const navigate = useNavigate();
  const [active, setActive] = useState<string | null>(null);
  const { scene, view, whole } = map;
  const hrefs = useMemo(() => hrefsUnder(base), [base]);
  if (map.sweeps.length === 0 && unread.length === 0) {
    return (
      <EmptyState
        drawing="sweeps"
        title="No sweeps yet"
        action={may.add && <LinkButton to={`${base}/sweeps/new`}>Add the first sweep</LinkButton>}
      >
        Drop in a text or Touchstone file, or a picture of a screen, and read its dips.
      </EmptyState>
    );
  }
  const searchFor = ({ fromHz, toHz }: FrequencyRange) =>
    stripSearch(view, {
      fromHz: fromHz > whole.fromHz ? fromHz : null,
      toHz: toHz < whole.toHz ? toHz : null,
    });
  const onRange = (to: FrequencyRange) =>
    navigate(searchFor(to), { replace: true, preventScrollReset: true });
  return (
    <section aria-labelledby="strip-map" className="grid gap-3">
      <div className="strip-head">
        <h2 id="strip-map">What moved, what did not</h2>
        <p className="text-small soft">
          {[
            countOf(counts.sweeps, "sweep"),
            counts.steps > 0 && countOf(counts.steps, "step"),
            countOf(counts.notes, "note"),
          ]
            .filter(Boolean)
            .join(" · ")}
          {counts.open > 0 && (
            <>
              {" · "}
              <Link to={`${base}/sweeps?only=open`} className="text-clay">
                {countOf(counts.open, "dip")} unsettled
              </Link>
            </>
          )}
        </p>
      </div>
      {map.sweeps.length > 0 && (
        <>
          <StripBar data={data} searchFor={searchFor} onRange={onRange} />
          <Waiting>
            <StripMap
              scene={scene}
              label="Strip map of the project: newest sweep on top"
              {...hrefs}
              activeTrail={active}
              onActive={setActive}
            >
              <StripDrag
                scale={frequencyScale(scene.scale.kind, scene.scale.fromHz, scene.scale.toHz)}
                onRange={onRange}
              />
            </StripMap>
          </Waiting>
        </>
      )}
      {unread.length > 0 && (
        <p className="text-small">
          To be read:{" "}
          {unread.map(({ publicId, title }, index) => (
            <span key={publicId}>
              {index > 0 && ", "}
              <Link to={`${base}/sweeps/${publicId}/reading`}>{title}</Link>
            </span>
          ))}
        </p>
      )}
      {map.more && (
        <p className="text-small soft">
          The map shows the newest {map.sweeps.length} sweeps; <Link to={`${base}/sweeps`}>all of them</Link>{" "}
          are in the list.
        </p>
      )}
    </section>
  );
}

function hrefsUnder(base: string) {
  return {
    stripHref: (id: string) => `${base}/sweeps/${id}`,
    stepHref: (id: string) => `${base}/steps/${id}`,
    trailHref: (id: string) => `${base}/trails/${id}`,
    dipHref: (id: string) => `${base}/dips/${id}`,
  };
}

/** A closer look is reckoned by the server: the map says while it waits. */
function Waiting({ children }: { children: React.ReactNode }) {
  const { state, location } = useNavigation();
  const waiting = state === "loading" && location?.pathname === globalThis.location?.pathname;
  return (
    <div className={waiting ? "strip-waiting" : undefined} aria-busy={waiting || undefined}>
      {children}
    </div>
  );
}

function countOf(n: number, what: string): string {
  return n === 1 ? `1 ${what}` : `${n} ${what}s`;
}
