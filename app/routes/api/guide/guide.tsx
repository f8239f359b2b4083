import { env } from "~/env.server";
import { openApiDocument } from "../openapi-document.ts";
import type { Route } from "./+types/guide";
import { Call } from "./components/Call.tsx";
import { Path } from "./components/Path.tsx";
import { Rules } from "./components/Rules.tsx";
import { guideGroups } from "./guide-groups.ts";

export const meta: Route.MetaFunction = () => [
  { title: "For scripts · Swale" },
  { name: "description", content: "The HTTP API of Swale: tokens, every call, worked examples." },
];

/** For whoever writes scripts: every call of the OpenAPI document with an example that is run as a test. */
export function loader() {
  const base = `${env.BASE_URL}/api/v1`;
  return { base, groups: guideGroups(openApiDocument(env.BASE_URL).paths, base) };
}

export default function ApiGuide({ loaderData: { base, groups } }: Route.ComponentProps) {
  return (
    <div className="methods-page">
      <nav aria-label="Calls" className="methods-contents api-contents">
        <div>
          <a href="#rules" className="font-semibold">
            Before the first call
          </a>
        </div>
        {groups.map(({ title, calls }) => (
          <div key={title}>
            <a href={`#${idOf(title)}`} className="font-semibold">
              {title}
            </a>
            <ul>
              {calls.map(({ id, method, path }) => (
                <li key={id}>
                  <a href={`#${id}`}>
                    {method} <Path path={path} />
                  </a>
                </li>
              ))}
            </ul>
          </div>
        ))}
      </nav>
      <article className="grid gap-10 min-w-0">
        <Rules base={base} />
        {groups.map(({ title, calls }) => (
          <section key={title} aria-labelledby={idOf(title)} className="grid gap-8 min-w-0">
            <h2 id={idOf(title)} className="text-title scroll-mt-4">
              {title}
            </h2>
            {calls.map((call) => (
              <Call key={call.id} call={call} />
            ))}
          </section>
        ))}
      </article>
    </div>
  );
}

function idOf(title: string): string {
  return `part-${title.toLowerCase().replace(/[^a-z]+/g, "-")}`;
}
