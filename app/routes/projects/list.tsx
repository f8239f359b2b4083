import { Link } from "react-router";
import { requirePerson } from "~/auth/require.server";
import { LinkButton } from "~/components/ui/Button";
import { RelativeTime } from "~/components/ui/DateTime";
import { EmptyState } from "~/components/ui/EmptyState";
import { Table } from "~/components/ui/Table";
import { Tag } from "~/components/ui/Tag";
import * as projects from "~/db/projects.server";
import type { Route } from "./+types/list";

export const meta: Route.MetaFunction = () => [{ title: "Projects · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const person = await requirePerson(args);
  const cursor = new URL(args.request.url).searchParams.get("cursor") ?? undefined;
  const { rows, nextCursor } = await projects.findPageByUser(person.id, { cursor });
  return {
    nextCursor,
    projects: rows.map((row) => ({
      id: row.publicId,
      title: row.title,
      visibility: row.visibility,
      demo: row.demo === 1,
      role: row.role,
      sweepCount: row.sweepCount,
      updatedAt: row.updatedAt.toISOString(),
    })),
  };
}

export default function ProjectList({ loaderData }: Route.ComponentProps) {
  const { projects, nextCursor } = loaderData;
  return (
    <div className="space-y-6">
      <div className="flex flex-wrap items-center justify-between gap-3">
        <h1>Projects</h1>
        {projects.length > 0 && (
          <div className="flex flex-wrap gap-3">
            <LinkButton to="/projects/take-in" variant="quiet" icon="upload">
              Take a bundle in
            </LinkButton>
            <LinkButton to="/projects/new" icon="add">
              New project
            </LinkButton>
          </div>
        )}
      </div>
      {projects.length === 0 ? (
        <EmptyState
          drawing="projects"
          title="No projects yet"
          action={
            <LinkButton to="/projects/new" icon="add">
              New project
            </LinkButton>
          }
        >
          A project is one experiment: its antenna, its sweeps and its people. One that was taken along as a{" "}
          <Link to="/projects/take-in">bundle</Link> comes back as it was.
        </EmptyState>
      ) : (
        <Table
          caption="Your projects"
          rows={projects}
          rowKey={(project) => project.id}
          columns={[
            {
              key: "title",
              label: "Project",
              cell: (project) => (
                <span>
                  <Link to={`/projects/${project.id}`}>{project.title}</Link>{" "}
                  {project.demo && <Tag tone="clay">invented data</Tag>}
                </span>
              ),
            },
            { key: "role", label: "You are", cell: (project) => project.role },
            { key: "visibility", label: "Visibility", cell: (project) => <Tag>{project.visibility}</Tag> },
            { key: "sweeps", label: "Sweeps", numeric: true, cell: (project) => project.sweepCount },
            { key: "updated", label: "Changed", cell: (project) => <RelativeTime at={project.updatedAt} /> },
          ]}
        />
      )}
      {nextCursor && <Link to={`?cursor=${encodeURIComponent(nextCursor)}`}>Older projects</Link>}
    </div>
  );
}
