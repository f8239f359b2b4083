import { data } from "react-router";
import { effectiveRole, mayInProject, type ProjectAction } from "~/auth/permissions";
import { type AccessArgs, findPerson } from "~/auth/require.server";
import { Mentions } from "~/components/mentions/Mentions";
import * as projects from "~/db/projects.server";
import type { Route } from "./+types/write-up";
import { ArticleText, Contents, listedOf } from "./components/ArticleText.tsx";
import { Foot } from "./components/Foot.tsx";
import { WriteUpHead } from "./components/WriteUpHead.tsx";
import { headOf } from "./head.ts";
import { requirePublication } from "./publication.server.ts";
import { loadWriteUpPage } from "./write-up-page.server.ts";

export const meta: Route.MetaFunction = ({ data }) => (data ? headOf(data) : [{ title: "Write-up · Swale" }]);
export const headers: Route.HeadersFunction = ({ loaderHeaders }) => loaderHeaders;

/** A published write-up, for anyone with its address. */
export async function loader(args: Route.LoaderArgs) {
  const publication = await requirePublication(args.request, args.params);
  const page = await loadWriteUpPage(publication, await readerOf(args, publication.project.publicId));
  return data(page, {
    headers: {
      Link: `<${page.origin}/webmention>; rel="webmention", <${page.address}>; rel="canonical"`,
      "Cache-Control": "private, no-cache",
    },
  });
}

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
