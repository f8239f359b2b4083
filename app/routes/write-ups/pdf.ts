import { env } from "~/env.server";
import { unavailable } from "~/errors";
import { BusyPrinting, printWriteUp } from "~/services/printing.server";
import { fileNameOf } from "~/services/write-ups/cite";
import { platesOf } from "~/services/write-ups/frozen";
import { loadDrawings } from "~/services/write-ups/plate-drawings.server";
import { plateStates } from "~/services/write-ups/published.server";
import type { Route } from "./+types/pdf";
import { answerForm, requirePublication } from "./publication.server.ts";

/** A published write-up on paper. */
export async function loader({ request, params }: Route.LoaderArgs) {
  const publication = await requirePublication(request, params);
  return answerForm(request, publication, "pdf", async () => {
    const ids = platesOf(publication.frozen.figures);
    const [plates, drawingOf] = await Promise.all([
      plateStates(publication.frozen.figures),
      loadDrawings(ids),
    ]);
    const drawings = new Map(
      ids.flatMap((id) => {
        const svg = drawingOf(id, "light", "wide");
        return svg ? [[id, svg] as const] : [];
      }),
    );
    const body = await printWriteUp({ publication, origin: env.BASE_URL, plates, drawings }).catch(
      (error) => {
        throw error instanceof BusyPrinting ? unavailable("Much is printed at this moment", BUSY) : error;
      },
    );
    return { body, mediaType: "application/pdf", fileName: `${fileNameOf(publication)}.pdf` };
  });
}

const BUSY = "The PDF was not made, and nothing was lost: ask for it again in a minute.";
