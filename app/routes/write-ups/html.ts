import { env } from "~/env.server";
import { fileNameOf } from "~/services/write-ups/cite";
import { fontFaces } from "~/services/write-ups/fonts.server";
import { platesOf } from "~/services/write-ups/frozen";
import { loadDrawings } from "~/services/write-ups/plate-drawings.server";
import { drawElsewhere, plateStates } from "~/services/write-ups/published.server";
import type { Route } from "./+types/html";
import { htmlDocument } from "./html-document.server.ts";
import { answerForm, requirePublication } from "./publication.server.ts";

/** A published write-up as one HTML file to take elsewhere. */
export async function loader({ request, params }: Route.LoaderArgs) {
  const publication = await requirePublication(request, params);
  return answerForm(request, publication, "html", async () => {
    const { figures } = publication.frozen;
    const [plates, drawingOf, fonts] = await Promise.all([
      plateStates(figures),
      loadDrawings(platesOf(figures)),
      fontFaces(),
    ]);
    const article = drawElsewhere(publication, env.BASE_URL, {
      plates,
      plateSource: (id, theme, width) => dataAddress(drawingOf(id, theme, width)),
    });
    return {
      body: htmlDocument(publication, article, { origin: env.BASE_URL, fonts }),
      mediaType: "text/html; charset=utf-8",
      fileName: `${fileNameOf(publication)}.html`,
    };
  });
}

function dataAddress(svg: string | null): string | null {
  return svg && `data:image/svg+xml;base64,${Buffer.from(svg).toString("base64")}`;
}
