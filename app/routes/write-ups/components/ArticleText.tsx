import type { Heading } from "~/services/markdown-article";

/** A write-up's text. `html` must come from the server's Markdown service, which cleans it; nothing else may be given here. */
export function ArticleText({ html }: { html: string }) {
  // biome-ignore lint/security/noDangerouslySetInnerHtml: cleaned by the server before it is sent
  return <div className="article" dangerouslySetInnerHTML={{ __html: html }} />;
}

/** Its headings as links; nothing where there are too few to be looked up. */
export function Contents({ headings }: { headings: Heading[] }) {
  const listed = listedOf(headings);
  if (listed.length === 0) return null;
  return (
    <nav className="article-contents" aria-labelledby="contents">
      <h2 id="contents">Contents</h2>
      <ol>
        {listed.map(({ id, depth, words }) => (
          <li key={id} className={`depth-${depth}`}>
            <a href={`#${id}`}>{words}</a>
          </li>
        ))}
      </ol>
    </nav>
  );
}

/** The first three depths that are used, from 1; few headings need no list. */
export function listedOf(headings: Heading[]): Heading[] {
  if (headings.length < FEWEST) return [];
  const top = Math.min(...headings.map(({ depth }) => depth));
  return headings.flatMap(({ depth, ...rest }) => {
    const level = depth - top + 1;
    return level <= 3 && rest.words !== "" ? [{ ...rest, depth: level }] : [];
  });
}

const FEWEST = 3;
