import type { Route } from "./+types/methods";
import { DefinitionPart } from "./components/DefinitionPart";
import { CHAPTERS } from "./definitions/chapters";
import { showDefinition } from "./shown-definition.server";

export const meta: Route.MetaFunction = () => [
  { title: "Methods · Swale" },
  {
    name: "description",
    content: "How each number in Swale is reckoned: formula, source, limits, worked example.",
  },
];

export function loader({ request }: Route.LoaderArgs) {
  const search = new URL(request.url).searchParams;
  return {
    chapters: CHAPTERS.map(({ title, definitions }) => ({
      title,
      definitions: definitions.map((definition) => showDefinition(definition, search)),
    })),
  };
}

export default function Methods({ loaderData: { chapters } }: Route.ComponentProps) {
  return (
    <div className="methods-page">
      <nav aria-label="Definitions" className="methods-contents">
        {chapters.map(({ title, definitions }) => (
          <div key={title}>
            <p className="font-semibold">{title}</p>
            <ul>
              {definitions.map((definition) => (
                <li key={definition.id}>
                  <a href={`#${definition.id}`}>{definition.title}</a>
                </li>
              ))}
            </ul>
          </div>
        ))}
      </nav>
      <article className="grid gap-10 min-w-0">
        <header className="grid gap-2 max-w-[72ch]">
          <h1>Methods</h1>
          <p>
            What each number means, how it is reckoned, where that comes from and where it does not hold.
            Every example below runs the same code as the sweeps' pages: put in other values, and the address
            keeps them.
          </p>
          <p className="soft text-small">
            “From memory, not seen” stands where a source is known but its text was not at hand. The examples'
            antennas are invented.
          </p>
        </header>
        {chapters.map(({ title, definitions }) => (
          <section key={title} aria-label={title} className="grid gap-8">
            <h2 className="text-title">{title}</h2>
            {definitions.map((definition) => (
              <DefinitionPart key={definition.id} definition={definition} />
            ))}
          </section>
        ))}
      </article>
    </div>
  );
}
