import { Form, Link } from "react-router";
import { requireProject } from "~/auth/require.server";
import { Photographs } from "~/components/photographs/Photographs";
import { Button, LinkButton } from "~/components/ui/Button";
import { DateTime } from "~/components/ui/DateTime";
import { EmptyState } from "~/components/ui/EmptyState";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import { listPhotographs } from "~/services/photographs.server";
import type { Route } from "./+types/antenna";
import { loadAntennaPage, parseOn } from "./antenna-page.server";
import { AntennaCautions } from "./components/AntennaCautions";
import { DesignBands } from "./components/DesignBands";
import { History } from "./components/History";
import { Elements, OtherParts } from "./components/Parts";
import { Sketch } from "./components/Sketch";
import { lengthUnitOf } from "./sizes";

export const meta: Route.MetaFunction = () => [{ title: "Antenna · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const { project, person, may } = await requireProject(args, "project.read");
  const unit = lengthUnitOf(person);
  const asked = new URL(args.request.url).searchParams.get("on");
  const [page, bands, photographs, dismissed] = await Promise.all([
    loadAntennaPage(project.id, parseOn(asked), unit),
    projects.findDesignBands(project.id),
    listPhotographs({ projectId: project.id }),
    person ? people.findDismissals(person.id) : [],
  ]);
  return {
    project: { publicId: project.publicId },
    mayEdit: may("antenna.edit"),
    unit,
    on: parseOn(asked) ? asked : null,
    bands: bands.map(({ publicId, name, lowHz, highHz, swrLimit }) => ({
      publicId,
      name,
      lowHz,
      highHz,
      swrLimit,
    })),
    photographs,
    dismissed,
    ...page,
  };
}

export default function AntennaPage({ loaderData }: Route.ComponentProps) {
  const { project, mayEdit, unit, antenna, bands, photographs } = loaderData;
  const edit = `/projects/${project.publicId}/antenna/edit`;
  return (
    <article className="grid gap-8">
      <header className="flex flex-wrap items-start justify-between gap-x-6 gap-y-3">
        <div className="grid gap-1">
          <h2 className="sweep-title">Antenna</h2>
          <Validity data={loaderData} />
        </div>
        {mayEdit && loaderData.describedFrom && (
          <LinkButton to={edit} icon="edit" size="small" variant="quiet">
            Change
          </LinkButton>
        )}
      </header>
      {(antenna || mayEdit) && <AntennaCautions dismissed={loaderData.dismissed} />}
      {!loaderData.describedFrom && (
        <EmptyState
          drawing="projects"
          title="The antenna is not described yet"
          action={mayEdit && <LinkButton to={edit}>Describe the antenna</LinkButton>}
        >
          {mayEdit && "With its lengths, dips can be explained and trims reckoned."}
        </EmptyState>
      )}
      <div className="grid gap-10 lg:grid-cols-[minmax(0,1fr)_20rem]">
        <div className="grid gap-8 content-start min-w-0">
          {antenna && (
            <>
              <Sketch antenna={antenna} unit={unit} />
              <section aria-labelledby="elements" className="grid gap-3">
                <h2 id="elements">Elements</h2>
                <Elements antenna={antenna} unit={unit} />
              </section>
              <section aria-labelledby="others" className="grid gap-3">
                <h2 id="others">Feedline and ground</h2>
                <OtherParts antenna={antenna} unit={unit} />
              </section>
            </>
          )}
          <DesignBands bands={bands} editTo={mayEdit ? `${edit}#bands` : null} />
          <Photographs
            project={project.publicId}
            photographs={photographs}
            mayEdit={mayEdit}
            what="the antenna and its feed"
          />
        </div>
        {loaderData.describedFrom && (
          <aside className="grid gap-8 content-start min-w-0" aria-label="How it came to be so">
            <OnForm on={loaderData.on} />
            <History projectId={project.publicId} history={loaderData.history} />
          </aside>
        )}
      </div>
    </article>
  );
}

/** Of which time this is, and what that is worth. */
function Validity({ data }: { data: Route.ComponentProps["loaderData"] }) {
  const { validFrom, validUntil, describedFrom, on } = data;
  if (!describedFrom) return null;
  if (!validFrom) {
    return (
      <p role="status" className="max-w-[60ch]">
        The antenna is not described for that day: its description begins on <DateTime at={describedFrom} />.
        What it was before is not known. <Link to="?">Show it as it is now</Link>
      </p>
    );
  }
  if (!on) {
    return (
      <p className="soft">
        As it is since <DateTime at={validFrom} />.
      </p>
    );
  }
  return (
    <p role="status">
      As it was from <DateTime at={validFrom} />
      {validUntil ? (
        <>
          {" "}
          until <DateTime at={validUntil} />
        </>
      ) : (
        " on, and still is"
      )}
      . {validUntil && <Link to="?">Show it as it is now</Link>}
    </p>
  );
}

function OnForm({ on }: { on: string | null }) {
  return (
    <Form method="get" className="grid gap-2 no-print" preventScrollReset>
      <label className="grid gap-1">
        <span className="font-semibold">As it was on</span>
        <input type="date" name="on" defaultValue={on?.slice(0, 10) ?? ""} className="control" required />
      </label>
      <div>
        <Button variant="quiet" size="small">
          Show
        </Button>
      </div>
    </Form>
  );
}
