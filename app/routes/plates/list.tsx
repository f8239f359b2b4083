import { Link } from "react-router";
import { requireProject } from "~/auth/require.server";
import { LinkButton } from "~/components/ui/Button";
import { DateTime } from "~/components/ui/DateTime";
import { EmptyState } from "~/components/ui/EmptyState";
import { Tag } from "~/components/ui/Tag";
import * as plates from "~/db/plates.server";
import type { Route } from "./+types/list";
import { PlateThumb } from "./components/PlateThumb";
import { indexOf } from "./plate-index";
import { KINDS } from "./words";

export const meta: Route.MetaFunction = () => [{ title: "Plates · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const { project, may } = await requireProject(args, "project.read");
  const rows = await plates.findAllByProject(project.id);
  return {
    projectId: project.publicId,
    mayMake: may("plate.make"),
    plates: indexOf(rows),
  };
}

/** The index of the project's atlas: a line a number, its newest version shown. */
export default function Plates({ loaderData }: Route.ComponentProps) {
  const { projectId, mayMake, plates } = loaderData;
  const make = `/projects/${projectId}/plates/new`;
  return (
    <section aria-labelledby="plates" className="grid gap-6">
      <header className="flex flex-wrap items-end justify-between gap-4">
        <h2 id="plates" className="sweep-title">
          Plates
        </h2>
        {mayMake && plates.length > 0 && (
          <LinkButton to={make} icon="add" size="small">
            Make a plate
          </LinkButton>
        )}
      </header>
      {plates.length === 0 ? (
        <EmptyState
          drawing="plates"
          title="No plate yet"
          action={mayMake && <LinkButton to={make}>Make the first plate</LinkButton>}
        >
          A plate freezes a figure and its numbers at an address that never changes, to be cited and embedded.
        </EmptyState>
      ) : (
        <ol className="plate-index">
          {plates.map((plate) => (
            <li key={plate.number}>
              <span className="plate-index-number" aria-hidden="true">
                {plate.number}
              </span>
              <Link to={`/plates/${plate.publicId}`} className="plate-thumb-link" tabIndex={-1} aria-hidden>
                {plate.withdrawnAt ? (
                  <span className="plate-thumb plate-thumb-gone" />
                ) : (
                  <PlateThumb publicId={plate.publicId} title={plate.title} />
                )}
              </Link>
              <div className="plate-index-words">
                <h3>
                  <Link to={`/plates/${plate.publicId}`}>
                    <span className="sr-only">Plate {plate.number}: </span>
                    {plate.title}
                  </Link>
                </h3>
                <p className="text-small soft">
                  {KINDS[plate.kind]} · <DateTime at={plate.createdAt} dateOnly />
                </p>
                {plate.withdrawnAt && (
                  <p>
                    <Tag tone="clay">withdrawn</Tag>
                  </p>
                )}
                {plate.earlier.length > 0 && (
                  <p className="text-small soft">
                    Version {plate.version}. Before it:{" "}
                    {plate.earlier.map(({ publicId, version }, i) => (
                      <span key={publicId}>
                        {i > 0 && ", "}
                        <Link to={`/plates/${publicId}`}>version {version}</Link>
                      </span>
                    ))}
                  </p>
                )}
              </div>
            </li>
          ))}
        </ol>
      )}
    </section>
  );
}
