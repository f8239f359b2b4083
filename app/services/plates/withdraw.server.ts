import { inTransaction } from "~/db/client.server";
import * as plates from "~/db/plates.server";
import * as projects from "~/db/projects.server";
import { record } from "../events.server.ts";
import { forgetForms } from "./forms.server.ts";

/** Takes a plate back: its address then says why, for ever. False where that was done before. */
export async function withdraw(
  plate: Pick<plates.PlateRow, "id" | "publicId" | "projectId" | "title">,
  reason: string,
  by: { id: number },
): Promise<boolean> {
  const done = await inTransaction(async (tx) => {
    if (plate.projectId !== null) await projects.lock(plate.projectId, tx);
    const values = { withdrawnAt: new Date(), withdrawnReason: reason, withdrawnBy: by.id };
    if (!(await plates.setWithdrawn(plate.id, values, tx))) return false;
    if (plate.projectId !== null) {
      const about = { plate: plate.publicId, title: plate.title };
      await record({ projectId: plate.projectId, kind: "plate.withdrawn", actorId: by.id, about }, tx);
    }
    return true;
  });
  forgetForms(plate.publicId);
  return done;
}
