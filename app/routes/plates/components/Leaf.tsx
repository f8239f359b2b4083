import { Link } from "react-router";
import { DateTime } from "~/components/ui/DateTime";
import { Markdown } from "~/components/ui/Markdown";
import type { PlatePageData } from "../plate-page.server";
import { RecordTables } from "./RecordTables";

/** The leaf itself: number, title, figure, numbers, caption, and in small type who, when and under which licence. */
export function Leaf({ plate }: { plate: PlatePageData }) {
  const { number, version, title, project, projectPath, licence } = plate;
  return (
    <div className="plate-sheet">
      <header className="plate-head">
        {!plate.titled && (
          <p className="plate-number">
            Plate {number}
            {version > 1 && `, version ${version}`}
          </p>
        )}
        <h1 className={plate.titled ? "sr-only" : undefined}>{title}</h1>
        <p className="plate-small">
          From {projectPath ? <Link to={projectPath}>{project.title}</Link> : project.title}
        </p>
      </header>
      <Figures wide={plate.wide} narrow={plate.narrow} />
      {plate.captionHtml && (
        <div className="plate-caption">
          <Markdown html={plate.captionHtml} />
        </div>
      )}
      <p className="plate-rule" aria-hidden="true">
        <span />
      </p>
      <section aria-label="Numbers" className="plate-numbers">
        <RecordTables tables={plate.tables} />
      </section>
      <p className="plate-small text-center">
        Made by {plate.madeBy} on <DateTime at={plate.madeAt} dateOnly />.{" "}
        {licence.address ? (
          <a href={licence.address} rel="license">
            {licence.name}
          </a>
        ) : (
          licence.name
        )}
        .
      </p>
      <p className="plate-small text-center hash">{plate.address}</p>
    </div>
  );
}

function Figures({ wide, narrow }: { wide: string | null; narrow: string | null }) {
  if (!wide) {
    return (
      <p className="panel">The figure could not be fetched just now. Its numbers are below; try again.</p>
    );
  }
  return (
    <>
      {/* biome-ignore lint/security/noDangerouslySetInnerHtml: the server drew it, and wrote every text in it as text */}
      <div className="plate-figure plate-wide" dangerouslySetInnerHTML={{ __html: wide }} />
      {/* biome-ignore lint/security/noDangerouslySetInnerHtml: as above */}
      <div className="plate-figure plate-narrow" dangerouslySetInnerHTML={{ __html: narrow ?? wide }} />
    </>
  );
}
