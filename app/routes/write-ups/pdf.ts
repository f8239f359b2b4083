import { env } from "~/env.server";
import { printPdf } from "~/services/pdf.server";
import { fileNameOf } from "~/services/write-ups/cite";
import { printable } from "~/services/write-ups/document.server";
import { platesOf } from "~/services/write-ups/frozen";
import { loadDrawings } from "~/services/write-ups/plate-drawings.server";
import { plateStates } from "~/services/write-ups/published.server";
import type { Route } from "./+types/pdf";
import { answerForm, requirePublication } from "./publication.server.ts";

/** A published write-up on paper. */
export async function loader({ request, params }: Route.LoaderArgs) {
  const publication = await requirePublication(request, params);
  return answerForm(request, publication, "pdf", async () => {
    const { figures } = publication.frozen;
    const [plates, drawingOf] = await Promise.all([plateStates(figures), loadDrawings(platesOf(figures))]);
    return {
      body: await printPdf(printable(publication, { origin: env.BASE_URL, plates, drawingOf })),
      mediaType: "application/pdf",
      fileName: `${fileNameOf(publication)}.pdf`,
    };
  });
}
