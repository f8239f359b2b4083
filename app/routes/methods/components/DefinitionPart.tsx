import type { ShownDefinition } from "../shown-definition.server";
import { WorkedExampleForm } from "./WorkedExampleForm";

/** One definition: what it says, its formulas, source and limits, and its worked example. */
export function DefinitionPart({ definition }: { definition: ShownDefinition }) {
  const { id, title, says, formulas, source, limits } = definition;
  return (
    <section id={id} aria-labelledby={`${id}-title`} className="definition">
      <div className="grid gap-3 content-start min-w-0">
        <h3 id={`${id}-title`} className="text-large">
          <a href={`#${id}`} className="definition-anchor">
            {title}
          </a>
        </h3>
        <p>{says}</p>
        {formulas.map((markup) => (
          // biome-ignore lint/a11y/noNoninteractiveTabindex: a formula that scrolls must be reachable by keyboard
          <section key={markup} className="formula" aria-label={`Formula of ${title}`} tabIndex={0}>
            {/* biome-ignore lint/security/noDangerouslySetInnerHtml: MathML that the server made from our own TeX */}
            <div dangerouslySetInnerHTML={{ __html: markup }} />
          </section>
        ))}
        <dl className="definition-facts">
          <dt>Source</dt>
          <dd>{source}</dd>
          <dt>Limits</dt>
          <dd>{limits}</dd>
        </dl>
      </div>
      <WorkedExampleForm definition={definition} />
    </section>
  );
}
