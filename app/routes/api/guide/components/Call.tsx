import type { GuideCall } from "../guide-groups.ts";
import { Code } from "./Code.tsx";
import { Path } from "./Path.tsx";
import { Words } from "./Words.tsx";

/** One call: what it is for, what may be asked, and its examples. */
export function Call({ call }: { call: GuideCall }) {
  const { id, method, path, summary, query, examples } = call;
  return (
    <section id={id} aria-labelledby={`${id}-title`} className="api-call">
      <h3 id={`${id}-title`} className="text-large">
        <a href={`#${id}`} className="definition-anchor">
          <code>
            {method} <Path path={path} />
          </code>
        </a>
      </h3>
      <p className="max-w-[72ch]">
        <Words text={`${summary}.`} />
      </p>
      {query.length > 0 && (
        <dl className="definition-facts">
          {query.map(({ name, says }) => (
            <div key={name} className="contents">
              <dt>
                <code>{name}</code>
              </dt>
              <dd>
                <Words text={says} />
              </dd>
            </div>
          ))}
        </dl>
      )}
      {examples.map(({ key, says, command, status, again, answer }) => (
        <div key={key} className="grid gap-2 min-w-0">
          <p className="max-w-[72ch]">
            <Words text={says} />
          </p>
          <Code label={`Command: ${says}`} text={command} />
          <details className="min-w-0">
            <summary>
              {again ? (
                <>
                  What it says once <code>{again.where}</code> is <code>{again.is}</code>
                </>
              ) : (
                <>
                  The answer, <code>{status}</code>
                </>
              )}
            </summary>
            <Code label={`Answer: ${says}`} text={answer} />
          </details>
        </div>
      ))}
    </section>
  );
}
