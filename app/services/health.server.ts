import { ping } from "~/db/health.server";
import { storageAnswers } from "./storage.server";

const PATIENCE_MS = 3_000;

export interface Readiness {
  ready: boolean;
  parts: Record<string, "answers" | "does not answer">;
}

/** Asks what the product cannot do without; each part within a few seconds. */
export async function readiness(): Promise<Readiness> {
  const [database, storage] = await Promise.all([within(ping().then(() => true)), within(storageAnswers())]);
  const word = (answers: boolean) => (answers ? "answers" : "does not answer");
  return { ready: database && storage, parts: { database: word(database), storage: word(storage) } };
}

async function within(work: Promise<boolean>): Promise<boolean> {
  let timer: NodeJS.Timeout | undefined;
  const late = new Promise<boolean>((resolve) => {
    timer = setTimeout(() => resolve(false), PATIENCE_MS);
  });
  return Promise.race([work.catch(() => false), late]).finally(() => clearTimeout(timer));
}
