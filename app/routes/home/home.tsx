import { Link } from "react-router";
import { findPerson } from "~/auth/require.server";
import { LinkButton } from "~/components/ui/Button";
import { RelativeTime } from "~/components/ui/DateTime";
import { EmptyState } from "~/components/ui/EmptyState";
import { Tag } from "~/components/ui/Tag";
import * as projects from "~/db/projects.server";
import { plainText } from "~/services/markdown.server";
import type { Route } from "./+types/home";
import { ExampleSweep } from "./components/ExampleSweep.tsx";
import { loadExample } from "./example.server.ts";

export const meta: Route.MetaFunction = () => [
  { title: "Swale: antenna sweeps, read and talked over" },
  {
    name: "description",
    content:
      "Drop in a sweep of an antenna and read each dip's frequency, lowest SWR and bandwidth, with a thread under it.",
  },
];

export async function loader(args: Route.LoaderArgs) {
  const [person, example, listed] = await Promise.all([
    findPerson(args),
    loadExample(),
    projects.findAllPublic(20),
  ]);
  return {
    signedIn: person !== null,
    example,
    projects: listed.map((project) => ({
      id: project.publicId,
      title: project.title,
      summary: plainText(project.summary, 180),
      demo: project.demo === 1,
      sweepCount: project.sweepCount,
      updatedAt: project.updatedAt.toISOString(),
    })),
  };
}

export default function Home({ loaderData }: Route.ComponentProps) {
  const { signedIn, example, projects } = loaderData;
  return (
    <div className="space-y-12">
      <section className="max-w-[46rem] space-y-4">
        <h1 className="text-huge">Where the dips are, and why</h1>
        <p className="text-large">
          Swale reads an antenna's sweep from a text file, a Touchstone file or a picture of a screen, finds
          every dip with its frequency, lowest SWR and bandwidth, and gives each a thread where the people of
          a project settle what causes it.
        </p>
        <p className="flex flex-wrap gap-3">
          {signedIn ? (
            <LinkButton to="/projects">Your projects</LinkButton>
          ) : (
            <LinkButton to="/sign-in?next=%2Fprojects%2Fnew">Sign in and begin a project</LinkButton>
          )}
        </p>
      </section>
      {example && <ExampleSweep example={example} />}
      <section aria-labelledby="public-projects" className="space-y-3">
        <h2 id="public-projects">Public projects</h2>
        {projects.length === 0 ? (
          <EmptyState
            drawing="projects"
            title="No project is public yet"
            action={<LinkButton to="/projects/new">Begin one</LinkButton>}
          />
        ) : (
          <ul className="grid gap-x-10 md:grid-cols-2">
            {projects.map((project) => (
              <li key={project.id} className="space-y-1 border-t border-rule py-3">
                <p className="flex flex-wrap items-baseline gap-x-3">
                  <Link to={`/projects/${project.id}`} className="font-semibold">
                    {project.title}
                  </Link>
                  {project.demo && <Tag tone="clay">invented data</Tag>}
                </p>
                {project.summary && <p className="max-w-[72ch]">{project.summary}</p>}
                <p className="soft text-small">
                  {project.sweepCount === 1 ? "1 sweep" : `${project.sweepCount} sweeps`}, changed{" "}
                  <RelativeTime at={project.updatedAt} />
                </p>
              </li>
            ))}
          </ul>
        )}
      </section>
    </div>
  );
}
