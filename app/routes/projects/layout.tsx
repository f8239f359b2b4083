import { NavLink, Outlet } from "react-router";
import { requireProject } from "~/auth/require.server";
import { LiveProject } from "~/components/live/LiveProject";
import { Looking } from "~/components/live/Looking";
import type { PlatesOfProject } from "~/components/plates/MakePlate";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import { Tag } from "~/components/ui/Tag";
import { markOf } from "~/services/live-marks.server";
import type { Route } from "./+types/layout";

/** The head of every page of a project. What is under it asks for access itself. */
export async function loader(args: Route.LoaderArgs) {
  const { project, membership, may, lastEventId } = await requireProject(args, "project.read");
  const shown = {
    project: {
      id: project.publicId,
      title: project.title,
      visibility: project.visibility,
      demo: project.demo === 1,
    },
    membership,
    mayEdit: may("project.edit"),
    mayExport: may("project.export"),
    mayPlate: may("plate.make"),
    mark: markOf(project.id, lastEventId),
  };
  return shown satisfies PlatesOfProject;
}

export default function ProjectLayout({ loaderData }: Route.ComponentProps) {
  const { project, membership, mayEdit, mayExport, mark } = loaderData;
  const base = `/projects/${project.id}`;
  return (
    <LiveProject key={project.id} projectId={project.id} mark={mark} member={membership !== null}>
      <div className="space-y-6">
        <header className="space-y-2">
          {membership && <Breadcrumbs items={[{ label: "Projects", to: "/projects" }]} />}
          <div className="flex flex-wrap items-center gap-x-3 gap-y-1">
            <h1 className="text-title">{project.title}</h1>
            <Tag tone={project.visibility === "private" ? "plain" : "fen"}>{project.visibility}</Tag>
            {membership && <Tag>you: {membership}</Tag>}
            {project.demo && <Tag tone="clay">invented data</Tag>}
          </div>
          {project.demo && (
            <p className="soft text-small max-w-[72ch]">
              A demonstration: the people, places, call signs and numbers of this project are invented.
            </p>
          )}
          <nav
            aria-label="Project"
            className="project-tabs no-print flex flex-wrap gap-x-5 border-b border-rule"
          >
            <Tab to={base} end label="Story" />
            <Tab to={`${base}/sweeps`} label="Sweeps" />
            <Tab to={`${base}/benches`} label="Benches" />
            <Tab to={`${base}/antenna`} label="Antenna" />
            <Tab to={`${base}/steps`} label="Steps" />
            <Tab to={`${base}/plates`} label="Plates" />
            <Tab to={`${base}/write-ups`} label="Write-ups" />
            <Tab to={`${base}/activity`} label="Activity" />
            <Tab to={`${base}/members`} label="Members" />
            {mayEdit && <Tab to={`${base}/settings`} label="Settings" />}
            {mayExport && !mayEdit && <Tab to={`${base}/bundle`} label="Bundle" />}
          </nav>
          {membership && <Looking />}
        </header>
        <Outlet />
      </div>
    </LiveProject>
  );
}

function Tab({ to, label, end = false }: { to: string; label: string; end?: boolean }) {
  return (
    <NavLink
      to={to}
      end={end}
      className={({ isActive }) =>
        `-mb-px border-b-2 py-2 no-underline hover:underline ${isActive ? "border-fen font-semibold text-fen" : "border-transparent text-ink"}`
      }
    >
      {label}
    </NavLink>
  );
}
