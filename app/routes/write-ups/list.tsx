import { Link } from "react-router";
import { requireProject } from "~/auth/require.server";
import { LinkButton } from "~/components/ui/Button";
import { DateTime } from "~/components/ui/DateTime";
import { EmptyState } from "~/components/ui/EmptyState";
import { Tag } from "~/components/ui/Tag";
import * as writeUps from "~/db/write-ups.server";
import type { Route } from "./+types/list";

export const meta: Route.MetaFunction = () => [{ title: "Write-ups · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const { project, may, membership } = await requireProject(args, "project.read");
  const mayEdit = may("write-up.edit");
  return {
    projectId: project.publicId,
    isPrivate: project.visibility === "private",
    mayEdit,
    member: membership !== null,
    rows: await writeUps.findAllByProject(project.id, { drafts: mayEdit }),
  };
}

export default function WriteUps({ loaderData }: Route.ComponentProps) {
  const { projectId, isPrivate, mayEdit, member, rows } = loaderData;
  const base = `/projects/${projectId}/write-ups`;
  return (
    <div className="grid gap-6">
      <header className="flex flex-wrap items-center justify-between gap-3">
        <h2 className="sweep-title">Write-ups</h2>
        {mayEdit && rows.length > 0 && (
          <LinkButton to={`${base}/new`} icon="add" size="small">
            Begin a write-up
          </LinkButton>
        )}
      </header>
      {rows.length === 0 && (
        <EmptyState
          drawing="plates"
          title={mayEdit ? "No write-ups yet" : "Nothing is published yet"}
          action={mayEdit && <LinkButton to={`${base}/new`}>Begin the first write-up</LinkButton>}
        >
          A write-up is a page of your own words with plates, dips and sweeps in it, for readers outside.
        </EmptyState>
      )}
      {rows.length > 0 && (
        <ul className="grid gap-4 max-w-[56rem]">
          {rows.map((row) => (
            <Item key={row.publicId} row={row} base={base} mayEdit={mayEdit} />
          ))}
        </ul>
      )}
      {rows.length > 0 && (
        <p className="text-small soft max-w-[72ch]">
          {isPrivate ? (
            member && (
              <>
                What is published can be followed by a feed reader: make a private feed address under{" "}
                <Link to={`/projects/${projectId}/activity#feeds`}>Activity</Link>, and put{" "}
                <code>write-ups.atom</code> in the place of <code>activity.atom</code> in it.
              </>
            )
          ) : (
            <a href={`${base}.atom`} type="application/atom+xml">
              What is published, as an Atom feed
            </a>
          )}
        </p>
      )}
    </div>
  );
}

type Row = Route.ComponentProps["loaderData"]["rows"][number];

function Item({ row, base, mayEdit }: { row: Row; base: string; mayEdit: boolean }) {
  const published = row.publishedNumber !== null;
  const edit = `${base}/${row.publicId}/edit`;
  return (
    <li className="panel grid gap-1">
      <div className="flex flex-wrap items-baseline gap-x-3 gap-y-1">
        <h3 className="text-large">
          <Link to={published ? `/write-ups/${row.publicId}` : edit}>{row.publishedTitle ?? row.title}</Link>
        </h3>
        {published ? (
          <Tag tone="moss">published</Tag>
        ) : (
          <Tag tone={row.takenBackAt ? "clay" : "plain"}>{row.takenBackAt ? "taken back" : "draft"}</Tag>
        )}
        {mayEdit && row.changed && <Tag tone="clay">changed since</Tag>}
      </div>
      <p className="text-small soft">
        {row.by ?? "Former member"},{" "}
        {row.publishedAt ? (
          <>
            version {row.publishedNumber} of <DateTime at={row.publishedAt} dateOnly />
          </>
        ) : (
          <>
            last written in <DateTime at={row.updatedAt} />
          </>
        )}
      </p>
      {mayEdit && published && (
        <p className="text-small">
          <Link to={edit}>Go on writing</Link>
        </p>
      )}
    </li>
  );
}
