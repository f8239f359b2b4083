import * as writeUps from "~/db/write-ups.server";
import { env } from "~/env.server";
import { licenceOf } from "~/services/plates/licences";
import { shownMentions } from "~/services/webmention/shown.server";
import { peopleOf } from "~/services/write-ups/cite";
import { platesOf } from "~/services/write-ups/frozen";
import { drawPage, type Publication, type Reader, summaryOf } from "~/services/write-ups/published.server";

/** All that the page of a published version shows to `reader`, who is null for whoever may not open the project. */
export async function loadWriteUpPage(publication: Publication, reader: Reader) {
  const { writeUp, project, version, frozen } = publication;
  const [article, versions, mentions] = await Promise.all([
    drawPage(publication, reader),
    writeUps.findVersions(writeUp.id),
    shownMentions({ writeUpId: writeUp.id }),
  ]);
  const address = `${env.BASE_URL}/write-ups/${writeUp.publicId}`;
  const [plate] = platesOf(frozen.figures);
  return {
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
  };
}
export type WriteUpPage = Awaited<ReturnType<typeof loadWriteUpPage>>;
