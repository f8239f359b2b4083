import { Form, Link } from "react-router";
import { RangeBar } from "~/charts/RangeBar";
import type { FrequencyRange } from "~/charts/ranges";
import { MakePlate } from "~/components/plates/MakePlate";
import { Button, LinkButton } from "~/components/ui/Button";
import type { ProjectPageData } from "../../project-page.server.ts";
import { stripSearch } from "./strip.schema.ts";

interface StripBarProps {
  data: ProjectPageData;
  searchFor: (range: FrequencyRange) => string;
  onRange: (range: FrequencyRange) => void;
}

/** Closer and further, the axis, and which sweeps are shown: links and a form, so that each choice is an address. */
export function StripBar({ data, searchFor, onRange }: StripBarProps) {
  const { map, may, project } = data;
  const { view, whole, scene } = map;
  const { fromHz, toHz } = scene.scale;
  return (
    <div className="strip-bar no-print">
      <RangeBar
        now={{ fromHz, toHz }}
        whole={whole}
        scale={scene.scale.kind}
        of="the map"
        rangeHref={searchFor}
        onRange={onRange}
      />
      <nav aria-label="Frequency axis" className="choice">
        {(["log", "linear"] as const).map((scale) => (
          <Link
            key={scale}
            to={stripSearch(view, { scale })}
            replace
            preventScrollReset
            aria-current={view.scale === scale ? "true" : undefined}
          >
            {scale === "log" ? "Logarithmic" : "Linear"}
          </Link>
        ))}
      </nav>
      <HideForm data={data} />
      <MakePlate from="strip" view={view} />
      {may.add && (
        <LinkButton to={`/projects/${project.publicId}/sweeps/new`} icon="add" size="small">
          Add sweeps
        </LinkButton>
      )}
    </div>
  );
}

function HideForm({ data: { map } }: { data: ProjectPageData }) {
  const { view, sweeps } = map;
  const hidden = sweeps.filter(({ publicId }) => view.hide.includes(publicId)).length;
  const kept = new URLSearchParams(stripSearch(view, { hide: [] }));
  return (
    <details className="strip-hide">
      <summary>{hidden === 0 ? "Hide sweeps" : `${hidden} of ${sweeps.length} sweeps hidden`}</summary>
      <Form method="get" replace preventScrollReset className="strip-hide-form">
        {[...kept].map(([name, value]) => (
          <input key={name} type="hidden" name={name} value={value} />
        ))}
        <fieldset key={view.hide.join(" ")}>
          <legend className="text-small soft">Ticked sweeps are left out of the map</legend>
          <ul>
            {[...sweeps].reverse().map(({ publicId, title, caption }) => (
              <li key={publicId}>
                <label>
                  <input
                    type="checkbox"
                    name="hide"
                    value={publicId}
                    defaultChecked={view.hide.includes(publicId)}
                  />
                  <span className="number soft">{caption}</span> {title}
                </label>
              </li>
            ))}
          </ul>
        </fieldset>
        <div className="flex flex-wrap gap-3 items-center">
          <Button type="submit" size="small">
            Draw the map so
          </Button>
          {hidden > 0 && (
            <Link to={stripSearch(view, { hide: [] })} replace preventScrollReset>
              Show all
            </Link>
          )}
        </div>
      </Form>
    </details>
  );
}
