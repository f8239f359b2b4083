import { Link } from "react-router";
import { DateTime } from "~/components/ui/DateTime";
import type { WriteUpPage } from "../write-up-page.server.ts";

/** How it came about, what may be done with it, and what to take along. */
export function Foot({ page }: { page: WriteUpPage }) {
  const { publicId, number, latest, versions, address, licence, title, people, publishedAt } = page;
  const search = number === latest ? "" : `?version=${number}`;
  return (
    <footer className="write-up-foot text-small">
      <p>
        {people.join(" and ")}: {title}. Version {number}, <DateTime at={publishedAt} />.{" "}
        <span className="provenance inline-block max-w-full break-words">
          {search === "" ? address : `${address}${search}`}
        </span>
      </p>
      <p>
        {licence?.address ? (
          <a href={licence.address}>{licence.name}</a>
        ) : (
          (licence?.name ?? "No licence is given.")
        )}
        {page.project.demo && ". The people, places, call signs and numbers of this project are invented"}.
      </p>
      <p className="no-print flex flex-wrap gap-x-5 gap-y-1">
        <a href={`/write-ups/${publicId}.pdf${search}`} download>
          PDF
        </a>
        <a href={`/write-ups/${publicId}.html${search}`} download>
          One HTML file that opens anywhere
        </a>
      </p>
      {versions.length > 1 && (
        <details className="no-print">
          <summary>Versions</summary>
          <ol className="grid gap-1 mt-2" reversed>
            {versions.map((version) => (
              <li key={version.number}>
                {version.number === number ? (
                  `Version ${version.number}`
                ) : (
                  <Link to={`/write-ups/${publicId}?version=${version.number}`}>
                    Version {version.number}
                  </Link>
                )}
                , <DateTime at={version.publishedAt} dateOnly />, {version.by ?? "former member"}
                {version.remark && `: ${version.remark}`}
              </li>
            ))}
          </ol>
        </details>
      )}
    </footer>
  );
}
