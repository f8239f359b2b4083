import { data } from "react-router";
import { effectiveRole, mayInProject, type ProjectAction } from "~/auth/permissions";
import { type AccessArgs, findPerson } from "~/auth/require.server";
import * as projects from "~/db/projects.server";
import * as writeUps from "~/db/write-ups.server";
import { env } from "~/env.server";
import { notFound, type PlainError } from "~/errors";
import { licenceOf } from "~/services/plates/licences";
import { platesOf } from "~/services/write-ups/frozen";
import { drawPage, seek, summaryOf } from "~/services/write-ups/published.server";
import type { Route } from "./+types/write-up";
import { ArticleText, Contents, listedOf } from "./components/ArticleText.tsx";
import { Foot } from "./components/Foot.tsx";
import { WriteUpHead } from "./components/WriteUpHead.tsx";
import { headOf } from "./head.ts";

export const meta: Route.MetaFunction = ({ data }) => (data ? headOf(data) : [{ title: "Write-up · Swale" }]);
export const headers: Route.HeadersFunction = ({ loaderHeaders }) => loaderHeaders;

/** A published write-up, for anyone with its address. */
export async function loader(args: Route.LoaderArgs) {
  const { request, params } = args;
  const wanted = new URL(request.url).searchParams.get("version");
  const sought = await seek(params.writeUp, wanted);
  if (sought.kind === "absent") throw notFound("write-up");
  if (sought.kind === "taken-back") throw takenBack(sought.at);
  const { publication } = sought;
  const { writeUp, project, version, frozen, writer, by } = publication;
  const reader = await readerOf(args, project.publicId);
  const [article, versions] = await Promise.all([
    drawPage(publication, reader),
    writeUps.findVersions(writeUp.id),
  ]);
  const address = `${env.BASE_URL}/write-ups/${writeUp.publicId}`;
  const [plate] = platesOf(frozen.figures);
  return data(
    {
      publicId: writeUp.publicId,
      address,
      origin: env.BASE_URL,
      title: version.title,
      summary: summaryOf(version.body),
      article,
      number: version.number,
      latest: writeUp.publishedNumber ?? version.number,
      versions,
      publishedAt: version.publishedAt,
      firstAt: versions.at(-1)?.publishedAt ?? version.publishedAt,
      remark: version.remark,
      people: peopleOf(writer, by),
      licence: licenceOf(frozen.licence) ?? null,
      picture: plate ? `${env.BASE_URL}/plates/${plate}.png?width=1280` : null,
      project: {
        publicId: project.publicId,
        title: project.title,
        demo: project.demo === 1,
        feed: project.visibility === "private" ? null : `/projects/${project.publicId}/write-ups.atom`,
      },
      mayOpen: reader !== null,
      mayEdit: reader?.may("write-up.edit") ?? false,
    },
    {
      headers: {
        Link: `<${env.BASE_URL}/webmention>; rel="webmention", <${address}>; rel="canonical"`,
        "Cache-Control": "private, no-cache",
      },
    },
  );
}

export type WriteUpPage = Route.ComponentProps["loaderData"];

export default function WriteUp({ loaderData }: Route.ComponentProps) {
  const { article } = loaderData;
  const listed = listedOf(article.headings).length > 0;
  return (
    <article className="write-up">
      <WriteUpHead page={loaderData} />
      <div className={`write-up-body ${listed ? "with-contents" : ""}`}>
        <Contents headings={article.headings} />
        <ArticleText html={article.html} />
      </div>
      <Foot page={loaderData} />
    </article>
  );
}

/** Who may open the project that it is of; null for everybody else. */
async function readerOf(args: AccessArgs, publicId: string) {
  const person = await findPerson(args);
  const found = await projects.findWithRole(publicId, person?.id ?? null);
  const role = found ? effectiveRole(found.role, found.project.visibility) : null;
  return role && { person, may: (action: ProjectAction) => mayInProject(role, action) };
}

/** Who began it and who published it, each once. */
function peopleOf(writer: string | null, by: string | null): string[] {
  return [...new Set([writer ?? by ?? "former member", by ?? "former member"])];
}

function takenBack(at: Date) {
  const message = `Its authors took it back on ${at.toISOString().slice(0, 10)}. It may be published again at this address; ask them for it.`;
  return data<PlainError>({ title: "This write-up was taken back", message }, { status: 410 });
}
