import { Link } from "react-router";
import { LinkButton } from "~/components/ui/Button";
import { DateTime } from "~/components/ui/DateTime";
import { Tag } from "~/components/ui/Tag";
import type { WriteUpPage } from "../write-up-page.server.ts";

/** Title, people, date, version; and what an older version has to say of itself. */
export function WriteUpHead({ page }: { page: WriteUpPage }) {
  const { title, people, publishedAt, number, latest, project, mayOpen, mayEdit, publicId } = page;
  return (
    <header className="grid gap-3">
      <p className="text-small soft flex flex-wrap items-center gap-x-3 gap-y-1">
        <span>
          A write-up of{" "}
          {mayOpen ? <Link to={`/projects/${project.publicId}`}>{project.title}</Link> : project.title}
        </span>
        {project.demo && <Tag tone="clay">invented data</Tag>}
      </p>
      <h1 className="write-up-title">{title}</h1>
      <p className="soft">
        {people.join(" and ")}, <DateTime at={publishedAt} dateOnly />
        {latest > 1 && `, version ${number} of ${latest}`}
      </p>
      {number !== latest && (
        <p role="note" className="panel max-w-[44rem]">
          This is version {number}. There is a newer one:{" "}
          <Link to={`/write-ups/${publicId}`}>read version {latest}</Link>.
        </p>
      )}
      {mayEdit && (
        <div className="no-print">
          <LinkButton
            to={`/projects/${project.publicId}/write-ups/${publicId}/edit`}
            variant="quiet"
            size="small"
            icon="edit"
          >
            Go on writing
          </LinkButton>
        </div>
      )}
    </header>
  );
}
