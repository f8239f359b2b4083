import { data } from "react-router";
import { effectiveRole, mayInProject, type ProjectAction } from "~/auth/permissions";
import { type AccessArgs, findPerson } from "~/auth/require.server";
import { Mentions } from "~/components/mentions/Mentions";
import * as projects from "~/db/projects.server";
import * as writeUps from "~/db/write-ups.server";
import { env } from "~/env.server";
import { licenceOf } from "~/services/plates/licences";
import { shownMentions } from "~/services/webmention/shown.server";
import { peopleOf } from "~/services/write-ups/cite";
import { platesOf } from "~/services/write-ups/frozen";
import { drawPage, summaryOf } from "~/services/write-ups/published.server";
import type { Route } from "./+types/write-up";
import { ArticleText, Contents, listedOf } from "./components/ArticleText.tsx";
import { Foot } from "./components/Foot.tsx";
import { WriteUpHead } from "./components/WriteUpHead.tsx";
import { headOf } from "./head.ts";
import { requirePublication } from "./publication.server.ts";

export const meta: Route.MetaFunction = ({ data }) => (data ? headOf(data) : [{ title: "Write-up · Swale" }]);
export const headers: Route.HeadersFunction = ({ loaderHeaders }) => loaderHeaders;

/** A published write-up, for anyone with its address. */
export async function loader(args: Route.LoaderArgs) {
  const publication = await requirePublication(args.request, args.params);
  const { writeUp, project, version, frozen } = publication;
  const reader = await readerOf(args, project.publicId);
  const [article, versions, mentions] = await Promise.all([
    drawPage(publication, reader),
    writeUps.findVersions(writeUp.id),
    shownMentions({ writeUpId: writeUp.id }),
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
      mentions,
      number: version.number,
      latest: writeUp.publishedNumber ?? version.number,
      versions,
      publishedAt: version.publishedAt,
      firstAt: versions.at(-1)?.publishedAt ?? version.publishedAt,
      remark: version.remark,
      people: peopleOf(publication),
      licence: licenceOf(frozen.licence) ?? null,
      picture: plate ? `${env.BASE_URL}/plates/${plate}.png?width=1280` : null,
      project: {
        publicId: project.publicId,
        title: frozen.project,
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
        <div className="grid gap-8 min-w-0">
          <ArticleText html={article.html} />
          <Mentions mentions={loaderData.mentions} />
          <Foot page={loaderData} />
        </div>
      </div>
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
